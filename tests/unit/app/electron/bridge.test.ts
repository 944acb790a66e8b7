import { describe, expect, it, vi } from 'vitest';
import { type IpcRendererPart, makeBridge } from '../../../../app/electron/bridge.js';
import { CHANNELS } from '../../../../app/electron/channels.js';
import type { ShellBridge } from '../../../../app/host/contract.js';

/** The compiler demands each key of the contract here, and no other. */
const CONTRACT_KEYS: Record<keyof ShellBridge, true> = {
  chooseFolder: true,
  openDropped: true,
  saveFile: true,
  onCommand: true,
  onFolder: true,
  reportState: true,
};

const electron = vi.hoisted(() => ({
  exposed: [] as [string, object][],
  getPathForFile: vi.fn((_file: unknown) => '/study'),
}));

vi.mock('electron', () => ({
  contextBridge: {
    exposeInMainWorld: (name: string, value: object) => electron.exposed.push([name, value]),
  },
  ipcRenderer: { invoke: async () => undefined, send() {}, on() {}, removeListener() {} },
  webUtils: { getPathForFile: electron.getPathForFile },
}));

function ipcRenderer() {
  const sent: unknown[][] = [];
  const listeners = new Map<string, Set<(event: unknown, ...received: unknown[]) => void>>();
  const part: IpcRendererPart = {
    invoke: async (...all) => {
      sent.push(all);
      return all[0] === CHANNELS.saveFile ? true : { grant: 'g', name: 'study' };
    },
    send: (...all) => void sent.push(all),
    on: (channel, listener) => {
      const known = listeners.get(channel) ?? new Set();
      listeners.set(channel, known.add(listener));
    },
    removeListener: (channel, listener) => listeners.get(channel)?.delete(listener),
  };
  const arrive = (channel: string, payload: unknown) => {
    for (const listener of listeners.get(channel) ?? []) listener({ sender: 'ipc' }, payload);
  };
  return { part, sent, arrive, count: (channel: string) => listeners.get(channel)?.size ?? 0 };
}

describe('makeBridge', () => {
  it('has exactly the keys of the contract, all functions, and is frozen', () => {
    const bridge = makeBridge(ipcRenderer().part, () => '');
    expect(Object.keys(bridge).sort()).toEqual(Object.keys(CONTRACT_KEYS).sort());
    expect(Object.values(bridge).every((value) => typeof value === 'function')).toBe(true);
    expect(Object.isFrozen(bridge)).toBe(true);
  });

  it('sends each request on its own channel, and nothing but its arguments', async () => {
    const { part, sent } = ipcRenderer();
    const bridge = makeBridge(part, () => '/dropped');
    const bytes = new Uint8Array([1, 2]);
    const state = { enabled: [], checked: [], unsaved: false, title: 't' };
    expect(await bridge.chooseFolder()).toEqual({ grant: 'g', name: 'study' });
    await bridge.openDropped({});
    expect(await bridge.saveFile('a.csv', bytes)).toBe(true);
    bridge.reportState(state);
    expect(sent).toEqual([
      ['shell:choose-folder'],
      ['shell:open-dropped', '/dropped'],
      ['shell:save-file', 'a.csv', bytes],
      ['shell:report-state', state],
    ]);
  });

  it('answers nothing for a dropped file that is not on disk, and asks nobody', async () => {
    const { part, sent } = ipcRenderer();
    expect(await makeBridge(part, () => '').openDropped({})).toBeUndefined();
    expect(sent).toEqual([]);
  });

  it.each([
    ['onCommand', CHANNELS.command, 'note.save'],
    ['onFolder', CHANNELS.folder, { grant: 'g', name: 'n' }],
  ] as const)('%s gives the payload alone, until it is unsubscribed', (key, channel, payload) => {
    const { part, arrive, count } = ipcRenderer();
    const received: unknown[][] = [];
    const unsubscribe = makeBridge(part, () => '')[key]((...all: unknown[]) => received.push(all));
    arrive(channel, payload);
    expect(received).toEqual([[payload]]);
    expect(unsubscribe()).toBeUndefined();
    expect(count(channel)).toBe(0);
    arrive(channel, payload);
    expect(received).toHaveLength(1);
  });
});

describe('preload', () => {
  it('exposes one frozen object under one name', async () => {
    await import('../../../../app/electron/preload.js');
    expect(electron.exposed).toHaveLength(1);
    const [name, value] = electron.exposed[0] ?? ['', {}];
    expect(name).toBe('diptychShell');
    expect(Object.keys(value).sort()).toEqual(Object.keys(CONTRACT_KEYS).sort());
    expect(Object.isFrozen(value)).toBe(true);
    const file = {};
    await (value as ShellBridge).openDropped(file);
    expect(electron.getPathForFile).toHaveBeenCalledWith(file);
  });
});
