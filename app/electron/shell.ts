import type { BrowserWindow, Session } from 'electron';
import type { Result } from '../../core/result.js';
import type { OpenFolder } from '../host/contract.js';
import { afterWrites } from './afterWrites.js';
import { routeBridge } from './bridgeRoutes.js';
import { CHANNELS } from './channels.js';
import { askForFolder, saveAs, tell } from './dialogs.js';
import { folderOf } from './folders.js';
import { lastFolders } from './lastFolders.js';
import type { Log } from './log.js';
import { focusWindow, followPage, guardWindow, surviveCrashes } from './mainWindow.js';
import { keepMenu } from './menuKeeper.js';
import { START_URL } from './origin.js';
import { outsideFolders } from './outsideFolders.js';
import { pageState, savePage } from './pageState.js';
import type { ElectronParts, ShellFiles, ShellHost } from './parts.js';
import { placeFile } from './placeFile.js';
import { keepPlace } from './placeKeeper.js';
import { serve } from './protocol.js';
import { quitGuard } from './quitGuard.js';
import { soon } from './soon.js';
import { applyTheme } from './theme.js';
import { showWhenReady, windowOptions } from './window.js';
import { placeWindow } from './windowPlace.js';

/** Changes of the page are looked at once it has been quiet for this long, in ms. */
const FOLLOW_QUIET_MS = 200;

const NOT_OPENED = 'This folder could not be opened';

/** What the running shell still takes. */
export interface Shell {
  /** Brings the window forward and opens these folders in it. */
  openFromOutside(paths: readonly string[]): void;
  /** Resolves when everything that the shell and the host were writing is on the disk. */
  settled(): Promise<void>;
}

/**
 * Opens the window over a host; Electron must be ready. Resolves when the page has loaded.
 *
 * @param folders opened before the page loads, so that its session names them
 */
export async function openShell(
  parts: ElectronParts,
  host: ShellHost,
  files: ShellFiles,
  folders: readonly string[],
  log: Log,
): Promise<Shell> {
  const { app, dialog, nativeTheme, screen } = parts;
  const { services } = host;
  const { report } = services;
  const userFolder = app.getPath('userData');
  const places = placeFile(userFolder);
  const last = await lastFolders(userFolder);
  const { settings } = await services.settings.read();
  applyTheme(nativeTheme, settings.theme);

  const followSettings = soon(() => follow().catch(report), FOLLOW_QUIET_MS);
  const session = ownSession(parts);
  serve(session.protocol, afterWrites(host.handler, followSettings), log);

  const place = placeWindow(
    await places.read(),
    screen.getAllDisplays(),
    screen.getPrimaryDisplay(),
  );
  const window = new parts.BrowserWindow(
    windowOptions({
      ...files,
      place,
      session,
      dark: nativeTheme.shouldUseDarkColors,
      developerTools: !app.isPackaged,
    }),
  );
  showWhenReady(window, place);
  const send = sender(window);
  const page = pageState();
  const outside = outsideFolders((folder) => send(CHANNELS.folder, folder));
  page.onReport((state) => outside.listening(state !== undefined));
  followPage(window, page);
  surviveCrashes(parts, window, page, { nowMs: () => performance.now(), report });

  const changeMenu = keepMenu(parts.Menu, {
    mac: process.platform === 'darwin',
    state: undefined,
    recent: await services.recents.list(),
    letterKeys: settings.letterKeys,
    developerTools: !app.isPackaged,
    onCommand: (id) => send(CHANNELS.command, id),
    onRecent: (id) => openRecent(id).catch(report),
    onClearRecent: () => clearRecent().catch(report),
  });
  page.onReport((state) => changeMenu({ state }));

  guardWindow(
    parts,
    window,
    quitGuard({
      hasUnsaved: () => page.current()?.unsaved === true,
      save: () => savePage(page, (id) => send(CHANNELS.command, id)),
      ask: async (question) => (await dialog.showMessageBox(window, question)).response,
      closeWindow: () => window.close(),
      reloadPage: () => window.webContents.reload(),
      quitApp: () => app.quit(),
      report,
    }),
  );
  keepPlace(
    window,
    (bounds) => screen.getDisplayMatching(bounds).id,
    (seen) => places.write(seen).catch(report),
  );

  async function follow(): Promise<void> {
    const now = (await services.settings.read()).settings;
    applyTheme(nativeTheme, now.theme);
    changeMenu({ letterKeys: now.letterKeys, recent: await services.recents.list() });
  }

  /** The one way by which a path becomes an open folder. */
  async function grant(path: string): Promise<Result<OpenFolder>> {
    const folder = await folderOf(path);
    const opened = await services.openFolder(folder);
    if (opened.ok) {
      app.addRecentDocument(folder);
      followSettings();
    }
    return opened;
  }

  async function open(path: string): Promise<OpenFolder | undefined> {
    const opened = await grant(path);
    if (opened.ok) return opened.value;
    await tell(dialog, window, NOT_OPENED, opened.refusal.text);
    return undefined;
  }

  async function give(path: string): Promise<void> {
    const folder = await open(path);
    if (folder !== undefined) outside.give(folder);
  }

  async function openRecent(id: string): Promise<void> {
    const path = await services.recents.find(id);
    if (path !== undefined) await give(path);
  }

  async function clearRecent(): Promise<void> {
    await services.recents.clear();
    await last.clear();
    app.clearRecentDocuments();
    await follow();
  }

  routeBridge(parts.ipcMain, log, {
    chooseFolder: async () => {
      const path = await askForFolder(dialog, window, last);
      return path === undefined ? undefined : open(path);
    },
    openDropped: open,
    saveFile: (name, bytes) => saveAs(dialog, window, last, name, bytes),
    reportState: page.report,
  });

  const opened = await Promise.all(folders.map(grant));
  try {
    await window.loadURL(START_URL);
  } catch (error) {
    // Loading also fails when the reader closes the window meanwhile; that is no failure to start.
    if (!window.isDestroyed()) throw error;
  }
  const refusals = opened.flatMap((result) => (result.ok ? [] : [result.refusal.text]));
  if (refusals.length > 0) tell(dialog, window, NOT_OPENED, refusals.join('\n')).catch(report);
  return {
    openFromOutside: (paths) => {
      focusWindow(window);
      for (const path of paths) give(path).catch(report);
    },
    settled: async () => {
      await Promise.all([services.settled(), places.settled(), last.settled()]);
    },
  };
}

/** In memory only: no image, note or name that passes through the page is cached on the disk. */
function ownSession(parts: ElectronParts): Session {
  const session = parts.session.fromPartition('diptych', { cache: false });
  session.setSpellCheckerEnabled(false);
  return session;
}

/** Sends to the page, unless the window has gone meanwhile. */
function sender(window: BrowserWindow): (channel: string, payload: unknown) => void {
  return (channel, payload) => {
    if (!window.isDestroyed()) window.webContents.send(channel, payload);
  };
}
