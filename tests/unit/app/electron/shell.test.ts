import { mkdir, mkdtemp, realpath, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { MenuItem } from 'electron';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { beforeReady } from '../../../../app/electron/beforeReady.js';
import type { ShellHost } from '../../../../app/electron/parts.js';
import { placeFile } from '../../../../app/electron/placeFile.js';
import { start } from '../../../../app/electron/start.js';
import { createGrants } from '../../../../app/host/folders/grants.js';
import { createRecents } from '../../../../app/host/folders/recents.js';
import { createSettings } from '../../../../app/host/settings.js';
import { standIn } from './standIn.js';

let home: string;
let study: string;
beforeEach(async () => {
  home = await realpath(await mkdtemp(join(tmpdir(), 'diptych-window-')));
  study = join(home, 'study');
  await mkdir(study);
});
afterEach(() => rm(home, { recursive: true, force: true }));

/** The host's real grants, recent folders and settings in a folder of the test. */
function makeHost(): ShellHost & { readonly reported: unknown[] } {
  const grants = createGrants();
  const recents = createRecents(join(home, 'config'));
  const settings = createSettings(join(home, 'config'));
  const reported: unknown[] = [];
  return {
    reported,
    handler: () => new Response(''),
    services: {
      version: '0.0.0',
      recents,
      settings,
      openFolder: async (path) => {
        const opened = await grants.open(path);
        const root = opened.ok ? grants.find(opened.value.grant)?.root : undefined;
        if (root !== undefined) await recents.add(root);
        return opened;
      },
      report: (error) => void reported.push(error),
      settled: async () => {
        await Promise.all([settings.settled(), recents.settled()]);
      },
    },
  };
}

const STATE = { enabled: ['note.save'], checked: [], unsaved: false, title: 'Study 1' };

async function opened(argv: readonly string[] = ['diptych']) {
  const electron = standIn({ userData: join(home, 'shell') });
  const lines: string[] = [];
  const log = (line: string) => void lines.push(line);
  const given = { argv, cwd: home, userData: join(home, 'shell') };
  const beginning = beforeReady(electron.parts, given, log);
  if (beginning === undefined) throw new Error('another instance runs');
  const host = makeHost();
  electron.ready();
  await start(electron.parts, beginning, () => host, { preload: '/p', icon: '/i' }, log);
  return { ...electron, host, lines };
}

const whole = (name: string) => expect.objectContaining({ name, grant: expect.any(String) });

describe('beforeReady', () => {
  it('sets sandbox, switches and scheme before it ever waits for Electron', async () => {
    const { calls } = await opened();
    const until = calls.indexOf('when ready');
    expect(calls.slice(0, until)).toEqual([
      `path userData ${join(home, 'shell')}`,
      'lock',
      'sandbox',
      'switch host-resolver-rules',
      'switch disable-background-networking',
      'switch disable-component-update',
      'switch disable-domain-reliability',
      'scheme app',
    ]);
  });

  it('does nothing more when another instance runs', () => {
    const electron = standIn({ userData: home, first: false });
    const given = { argv: ['diptych', 'study'], cwd: home, userData: home };
    expect(beforeReady(electron.parts, given, () => undefined)).toBeUndefined();
    expect(electron.calls).toEqual([`path userData ${home}`, 'lock']);
  });

  it('restricts every session and confines every page that is made', async () => {
    const { calls } = await opened();
    for (const call of [
      'permission requests',
      'permission checks',
      'device permissions',
      'requests',
      'window open handler',
    ]) {
      expect(calls).toContain(call);
    }
  });
});

describe('start', () => {
  it('opens one hidden, sandboxed window on our own address, from a session that caches nothing', async () => {
    const { calls, window } = await opened();
    expect(calls).toEqual(
      expect.arrayContaining([
        'session diptych cache false',
        'spellcheck false',
        'serve app',
        'load app://local/',
      ]),
    );
    expect(calls).not.toContain('show');
    window().emit('ready-to-show');
    expect(calls.at(-1)).toBe('show');
    expect(window().given.webPreferences).toMatchObject({ sandbox: true, devTools: false });
  });

  it('tells of a start that fails, and exits', async () => {
    const electron = standIn({ userData: home });
    const given = { argv: ['diptych'], cwd: home, userData: home };
    const beginning = beforeReady(electron.parts, given, () => undefined);
    if (beginning === undefined) throw new Error('another instance runs');
    const lines: string[] = [];
    electron.ready();
    const failing = () => {
      throw new Error('no package.json above: x');
    };
    await start(electron.parts, beginning, failing, { preload: '', icon: '' }, (line) =>
      lines.push(line),
    );
    expect(electron.calls.at(-1)).toBe('exit 1');
    expect(electron.messages[0]).toContain(
      'Diptych could not start: Error: no package.json above: x',
    );
    expect(lines[0]).toContain('could not start');
  });

  it('opens the folder of the command line before the page loads', async () => {
    const { calls, messages } = await opened(['diptych', 'study']);
    expect(calls.indexOf(`recent ${study}`)).toBeGreaterThan(-1);
    expect(calls.indexOf(`recent ${study}`)).toBeLessThan(calls.indexOf('load app://local/'));
    expect(messages).toEqual([]);
  });

  it('loads the page all the same when that folder is not there, and says so', async () => {
    const { calls, messages } = await opened(['diptych', 'missing']);
    expect(calls).toContain('load app://local/');
    expect(messages).toEqual([
      'This folder could not be opened: missing can’t be opened: it is not there.',
    ]);
  });

  it('returns to the place of the last time', async () => {
    await placeFile(join(home, 'shell')).write({
      bounds: { x: 50, y: 60, width: 1100, height: 750 },
      maximised: true,
      fullScreen: false,
      displayId: 1,
    });
    const { calls, window } = await opened();
    expect(window().given).toMatchObject({ x: 50, y: 60, width: 1100, height: 750 });
    window().emit('ready-to-show');
    expect(calls.slice(-2)).toEqual(['maximise', 'show']);
  });

  it('waits for all writes before it quits, and remembers where the window was', async () => {
    const { app, calls, window, fromPage } = await opened();
    fromPage('shell:report-state', STATE);
    window().close();
    const event = { preventDefault: vi.fn() };
    app.emit('will-quit', event);
    expect(event.preventDefault).toHaveBeenCalledOnce();
    await vi.waitFor(() => expect(calls.filter((call) => call === 'quit')).toHaveLength(2));
    const again = { preventDefault: vi.fn() };
    app.emit('will-quit', again);
    expect(again.preventDefault).not.toHaveBeenCalled();
    expect((await placeFile(join(home, 'shell')).read())?.bounds.x).toBe(10);
  });
});

describe('the running shell', () => {
  it('turns chosen and dropped folders into grants, and never gives the page a path', async () => {
    const { answers, fromPage } = await opened();
    expect(await fromPage('shell:choose-folder')).toBeUndefined();
    answers.folder = study;
    const chosen = await fromPage('shell:choose-folder');
    expect(chosen).toEqual(whole('study'));
    expect(await fromPage('shell:open-dropped', study)).toEqual(chosen);
    expect(JSON.stringify(chosen)).not.toContain(home);
  });

  it('says why a dropped folder can’t be opened, and answers nothing', async () => {
    const { fromPage, messages } = await opened();
    expect(await fromPage('shell:open-dropped', join(home, 'missing'))).toBeUndefined();
    expect(messages).toEqual([
      'This folder could not be opened: missing can’t be opened: it is not there.',
    ]);
  });

  it('brings the window forward for a second start, and gives its folder to the page once that listens', async () => {
    const { app, calls, fromPage, sent } = await opened();
    app.emit('second-instance', {}, [], home, { folders: [study] });
    expect(calls.slice(-3)).toEqual(['restore', 'show', 'focus']);
    await vi.waitFor(() => expect(calls).toContain(`recent ${study}`));
    expect(sent).toEqual([]);
    fromPage('shell:report-state', STATE);
    await vi.waitFor(() => expect(sent).toEqual([['shell:folder', whole('study')]]));
  });

  it('opens a folder that macOS has handed over before anything was ready', async () => {
    const electron = standIn({ userData: join(home, 'shell') });
    const given = { argv: ['diptych'], cwd: home, userData: join(home, 'shell') };
    const beginning = beforeReady(electron.parts, given, () => undefined);
    if (beginning === undefined) throw new Error('another instance runs');
    const event = { preventDefault: vi.fn() };
    electron.app.emit('open-file', event, study);
    expect(event.preventDefault).toHaveBeenCalledOnce();
    electron.ready();
    await start(electron.parts, beginning, makeHost, { preload: '', icon: '' }, () => undefined);
    electron.fromPage('shell:report-state', STATE);
    await vi.waitFor(() => expect(electron.sent).toEqual([['shell:folder', whole('study')]]));
  });

  it('shows title and unsaved changes as the page reports them, until another page has loaded', async () => {
    const { fromPage, window } = await opened();
    fromPage('shell:report-state', { ...STATE, unsaved: true });
    expect([window().title, window().edited]).toEqual(['• Study 1', true]);
    window().webContents.emit('did-navigate');
    expect([window().title, window().edited]).toEqual(['Diptych', false]);
  });

  it('drops a report of a wrong form and logs it', async () => {
    const { fromPage, lines, window } = await opened();
    fromPage('shell:report-state', { title: 'x' });
    expect(window().title).toBe('');
    expect(lines).toHaveLength(1);
    expect(lines[0]).toMatch(/^refused shell:report-state: /);
  });

  it('holds a close with unsaved changes, saves through the page, and closes', async () => {
    const { answers, calls, fromPage, messages, sent, window } = await opened();
    fromPage('shell:report-state', { ...STATE, unsaved: true });
    answers.button = 0;
    window().close();
    expect(window().isDestroyed()).toBe(false);
    await vi.waitFor(() => expect(sent).toEqual([['shell:command', 'note.save']]));
    fromPage('shell:report-state', STATE);
    await vi.waitFor(() => expect(window().isDestroyed()).toBe(true));
    expect(messages).toHaveLength(1);
    expect(calls.at(-1)).toBe('quit');
  });

  it('stays open when the reader cancels', async () => {
    const { answers, fromPage, messages, window } = await opened();
    fromPage('shell:report-state', { ...STATE, unsaved: true });
    answers.button = 2;
    window().close();
    await vi.waitFor(() => expect(messages).toHaveLength(1));
    expect(window().isDestroyed()).toBe(false);
  });

  it('delays a shutdown of the system until the page has saved', async () => {
    const { calls, fromPage, messages, powerMonitor, sent } = await opened();
    fromPage('shell:report-state', { ...STATE, unsaved: true });
    const event = { preventDefault: vi.fn() };
    powerMonitor.emit('shutdown', event);
    expect(event.preventDefault).toHaveBeenCalledOnce();
    expect(sent).toEqual([['shell:command', 'note.save']]);
    expect(calls).not.toContain('quit');
    fromPage('shell:report-state', STATE);
    await vi.waitFor(() => expect(calls).toContain('quit'));
    expect(messages).toEqual([]);
  });

  it('reloads a page whose process has ended, and gives up after three times', async () => {
    const { answers, calls, host, messages, window } = await opened();
    answers.button = 1;
    const end = () => window().webContents.emit('render-process-gone', {}, { reason: 'crashed' });
    for (let time = 0; time < 3; time += 1) end();
    expect(calls.filter((call) => call === 'reload')).toHaveLength(3);
    expect(host.reported).toHaveLength(3);
    end();
    await vi.waitFor(() => expect(calls.at(-1)).toBe('quit'));
    expect(messages[0]).toContain('has stopped several times');
    expect(calls.filter((call) => call === 'reload')).toHaveLength(3);
  });

  it('lists opened folders in the menu, opens them from there, and clears every trace of them', async () => {
    const { calls, fromPage, menus, sent, host } = await opened();
    await fromPage('shell:open-dropped', study);
    const recent = () => {
      const file = menus.at(-1)?.find((menu) => menu.label === 'File')?.submenu;
      const item = Array.isArray(file) ? file.find((one) => one.id === 'recent') : undefined;
      return Array.isArray(item?.submenu) ? item.submenu : [];
    };
    await vi.waitFor(() => expect(recent()[0]?.label).toBe('study'));
    fromPage('shell:report-state', STATE);
    recent()[0]?.click?.({} as MenuItem, undefined, {});
    await vi.waitFor(() => expect(sent).toEqual([['shell:folder', whole('study')]]));
    recent()
      .at(-1)
      ?.click?.({} as MenuItem, undefined, {});
    await vi.waitFor(() =>
      expect(recent().map((item) => item.label)).toEqual([undefined, 'Clear recent']),
    );
    expect(calls).toContain('clear recent');
    expect(await host.services.recents.list()).toEqual([]);
  });

  it('takes the theme of the settings', async () => {
    await createSettings(join(home, 'config')).write({
      cautionsAccepted: true,
      theme: 'light',
      letterKeys: false,
      reader: '',
    });
    const { nativeTheme } = await opened();
    expect(nativeTheme.themeSource).toBe('light');
  });

  it('follows settings that the page has changed', async () => {
    const { host, menus, nativeTheme, request } = await opened();
    const { settings } = await host.services.settings.read();
    await host.services.settings.write({ ...settings, theme: 'dark', letterKeys: false });
    expect(nativeTheme.themeSource).toBe('dark');
    await request('app://local/api/settings', { method: 'PUT' });
    await vi.waitFor(() => expect(nativeTheme.themeSource).toBe('dark'));
    await vi.waitFor(() => expect(menus).toHaveLength(2));
    expect(JSON.stringify(menus[0])).toContain('Ellipse (E)');
    expect(JSON.stringify(menus[1])).not.toContain('Ellipse (E)');
  });
});
