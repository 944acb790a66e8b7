import { join } from 'node:path';
import {
  app,
  BrowserWindow,
  dialog,
  ipcMain,
  Menu,
  nativeTheme,
  powerMonitor,
  protocol,
  screen,
  session,
} from 'electron';
import { createServices } from '../host/createServices.js';
import { createHandler } from '../host/handler.js';
import { ensureDemonstration } from '../host/phantom/ensureDemonstration.js';
import { userFolders } from '../host/userFolders.js';
import { beforeReady } from './beforeReady.js';
import { logToStandardError } from './log.js';
import type { ElectronParts } from './parts.js';
import { start } from './start.js';

/** Entry of the Electron shell. Built to dist/app/main.js; the page lies in dist/renderer beside it. */
const here = import.meta.dirname;
const parts: ElectronParts = {
  app,
  BrowserWindow,
  dialog,
  ipcMain,
  Menu,
  nativeTheme,
  powerMonitor,
  protocol,
  screen,
  session,
};
const folders = userFolders();
const beginning = beforeReady(
  parts,
  { argv: process.argv, cwd: process.cwd(), userData: join(folders.config, 'shell') },
  logToStandardError,
);

if (beginning === undefined) {
  app.quit();
} else {
  const makeHost = () => {
    const services = createServices({
      folders,
      rendererDirectory: join(here, '..', 'renderer'),
      ensureDemonstration,
    });
    // No folder chooser of the host's own: the system's dialog stands in its place.
    const handler = createHandler(services, {
      openDemonstration: beginning.folders.length === 0,
    });
    return { services, handler };
  };
  const files = {
    preload: join(here, 'preload.cjs'),
    icon: join(here, '..', '..', 'assets', 'icons', 'icon.png'),
  };
  void start(parts, beginning, makeHost, files, logToStandardError);
}
