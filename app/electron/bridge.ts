import type { OpenFolder, ShellBridge, ShellState } from '../host/contract.js';
import { CHANNELS } from './channels.js';

/** The parts of Electron's ipcRenderer that the bridge uses. */
export interface IpcRendererPart {
  invoke(channel: string, ...sent: unknown[]): Promise<unknown>;
  send(channel: string, ...sent: unknown[]): void;
  on(channel: string, listener: (event: unknown, ...received: unknown[]) => void): unknown;
  removeListener(
    channel: string,
    listener: (event: unknown, ...received: unknown[]) => void,
  ): unknown;
}

/** Path of a dropped file on this machine; empty for a file that is not on disk. */
export type PathOfFile = (file: unknown) => string;

/**
 * The only thing that the page can reach outside itself. Nothing of Electron passes through: its
 * listeners get the payload alone, and the path of a dropped file goes straight to the main process.
 */
export function makeBridge(ipc: IpcRendererPart, pathOfFile: PathOfFile): ShellBridge {
  /** The main process has validated its answer (ipc.ts), so its form is known here. */
  const askForFolder = (channel: string, ...sent: unknown[]) =>
    ipc.invoke(channel, ...sent) as Promise<OpenFolder | undefined>;

  function subscribe<Payload>(channel: string, listener: (payload: Payload) => void): () => void {
    const withoutEvent = (_event: unknown, payload: unknown): void => listener(payload as Payload);
    ipc.on(channel, withoutEvent);
    return () => {
      ipc.removeListener(channel, withoutEvent);
    };
  }

  return Object.freeze<ShellBridge>({
    chooseFolder: () => askForFolder(CHANNELS.chooseFolder),
    openDropped: async (file) => {
      const path = pathOfFile(file);
      return path === '' ? undefined : askForFolder(CHANNELS.openDropped, path);
    },
    saveFile: (name, bytes) => ipc.invoke(CHANNELS.saveFile, name, bytes) as Promise<boolean>,
    onCommand: (listener) => subscribe<string>(CHANNELS.command, listener),
    onFolder: (listener) => subscribe<OpenFolder>(CHANNELS.folder, listener),
    reportState: (state: ShellState) => ipc.send(CHANNELS.reportState, state),
  });
}
