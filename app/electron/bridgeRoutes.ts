import type { OpenFolder, ShellState } from '../host/contract.js';
import { CHANNELS } from './channels.js';
import { handle, type IpcMainPart, listen } from './ipc.js';
import type { Log } from './log.js';
import {
  droppedArguments,
  noArguments,
  openFolderAnswer,
  saveArguments,
  savedAnswer,
  stateArguments,
} from './messages.js';

/** What the main process does for the page; the other end of the bridge. */
export interface BridgeActions {
  chooseFolder(): Promise<OpenFolder | undefined>;
  openDropped(path: string): Promise<OpenFolder | undefined>;
  saveFile(name: string, bytes: Uint8Array): Promise<boolean>;
  reportState(state: ShellState): void;
}

/** Answers the page's messages. These four channels are all that the main process listens to. */
export function routeBridge(ipcMain: IpcMainPart, log: Log, actions: BridgeActions): void {
  handle(ipcMain, log, {
    channel: CHANNELS.chooseFolder,
    takes: noArguments,
    gives: openFolderAnswer,
    answer: () => actions.chooseFolder(),
  });
  handle(ipcMain, log, {
    channel: CHANNELS.openDropped,
    takes: droppedArguments,
    gives: openFolderAnswer,
    answer: (path) => actions.openDropped(path),
  });
  handle(ipcMain, log, {
    channel: CHANNELS.saveFile,
    takes: saveArguments,
    gives: savedAnswer,
    answer: (name, bytes) => actions.saveFile(name, bytes),
  });
  listen(ipcMain, log, {
    channel: CHANNELS.reportState,
    takes: stateArguments,
    hear: (state) => actions.reportState(state),
  });
}
