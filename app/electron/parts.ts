import type * as Electron from 'electron';
import type { Services } from '../host/services.js';
import type { RequestHandler } from './protocol.js';

/** The parts of Electron that the shell is made of; handed in, so that tests can stand in for them. */
export type ElectronParts = Pick<
  typeof Electron,
  | 'app'
  | 'BrowserWindow'
  | 'dialog'
  | 'ipcMain'
  | 'Menu'
  | 'nativeTheme'
  | 'powerMonitor'
  | 'protocol'
  | 'screen'
  | 'session'
>;

/** The host as the shell sees it. */
export interface ShellHost {
  readonly services: Pick<
    Services,
    'version' | 'openFolder' | 'recents' | 'settings' | 'report' | 'settled'
  >;
  readonly handler: RequestHandler;
}

/** Where the built files lie. */
export interface ShellFiles {
  readonly preload: string;
  readonly icon: string;
}
