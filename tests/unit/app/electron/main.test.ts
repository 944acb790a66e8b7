import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { standIn } from './standIn.js';

const electron = vi.hoisted(() => ({ parts: {} as Record<string, unknown> }));

/** The entry loads Electron by name; each name leads to the stand-in that the test has made. */
vi.mock('electron', () => ({
  get app() {
    return electron.parts.app;
  },
  get BrowserWindow() {
    return electron.parts.BrowserWindow;
  },
  get dialog() {
    return electron.parts.dialog;
  },
  get ipcMain() {
    return electron.parts.ipcMain;
  },
  get Menu() {
    return electron.parts.Menu;
  },
  get nativeTheme() {
    return electron.parts.nativeTheme;
  },
  get powerMonitor() {
    return electron.parts.powerMonitor;
  },
  get protocol() {
    return electron.parts.protocol;
  },
  get screen() {
    return electron.parts.screen;
  },
  get session() {
    return electron.parts.session;
  },
}));

let home: string;
const before = { argv: process.argv, home: process.env.DIPTYCH_HOME };

beforeAll(async () => {
  home = await mkdtemp(join(tmpdir(), 'diptych-main-'));
  process.env.DIPTYCH_HOME = home;
});
afterAll(async () => {
  process.argv = before.argv;
  if (before.home === undefined) delete process.env.DIPTYCH_HOME;
  else process.env.DIPTYCH_HOME = before.home;
  await rm(home, { recursive: true, force: true });
});

/** Runs the entry as Electron would, packaged, with these arguments. */
async function run(argv: readonly string[], first = true) {
  const stand = standIn({ userData: join(home, 'config', 'shell'), first });
  electron.parts = stand.parts as unknown as Record<string, unknown>;
  process.argv = ['diptych', ...argv];
  vi.resetModules();
  stand.ready();
  await import('../../../../app/electron/main.js');
  return stand;
}

describe('main', () => {
  it('serves the host of this machine, and asks for the demonstration study when no folder is given', async () => {
    const stand = await run([]);
    await vi.waitFor(() => expect(stand.calls).toContain('load app://local/'));
    const response = await stand.request('app://local/api/session');
    expect(response.status).toBe(200);
    expect(await response.json()).toMatchObject({ folders: [], openDemonstration: true });
    expect(response.headers.get('content-security-policy')).toContain("default-src 'none'");
    expect(stand.window().given.webPreferences?.preload).toMatch(/preload\.cjs$/);
    // The system's dialog stands in the place of the host's own folder chooser.
    expect((await stand.request('app://local/api/browse')).status).toBe(404);
  });

  it('opens the folder that is given instead', async () => {
    const stand = await run([home]);
    await vi.waitFor(() => expect(stand.calls).toContain('load app://local/'));
    const session = await (await stand.request('app://local/api/session')).json();
    expect(session).toMatchObject({ folders: [{ name: basename(home) }] });
    expect(session.openDemonstration).toBe(false);
  });

  it('quits at once when another instance runs', async () => {
    const stand = await run([home], false);
    expect(stand.calls.at(-1)).toBe('quit');
    expect(stand.calls).not.toContain('when ready');
  });
});
