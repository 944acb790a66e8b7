import { contextBridge, ipcRenderer, webUtils } from 'electron';
import { makeBridge } from './bridge.js';

/**
 * Runs in the page's process, sandboxed, before the page does. Gives the page one frozen object.
 * A value that is no dropped file makes getPathForFile throw a TypeError, which reaches the page.
 */
contextBridge.exposeInMainWorld(
  'diptychShell',
  makeBridge(ipcRenderer, (file) =>
    webUtils.getPathForFile(file as Parameters<typeof webUtils.getPathForFile>[0]),
  ),
);
