import type { BrowserWindow } from 'electron';
import { crashPolicy } from './crash.js';
import type { PageState } from './pageState.js';
import { pageTitle } from './pageTitle.js';
import type { ElectronParts } from './parts.js';
import type { QuitGuard } from './quitGuard.js';

/** Shows what the page reports in the window's title and, on macOS, in its close button. */
export function followPage(window: BrowserWindow, page: PageState): void {
  // A page that has just been loaded has said nothing yet, whatever the one before it said.
  window.webContents.on('did-navigate', () => page.report(undefined));
  page.onReport((state) => {
    if (window.isDestroyed()) return;
    window.setTitle(pageTitle(state));
    window.setDocumentEdited(state?.unsaved === true);
  });
}

/** Puts the guard in the way of everything that could lose unsaved changes. */
export function guardWindow(parts: ElectronParts, window: BrowserWindow, guard: QuitGuard): void {
  parts.app.on('before-quit', () => guard.beforeQuit());
  window.on('close', (event) => {
    if (guard.close()) event.preventDefault();
  });
  window.webContents.on('will-prevent-unload', (event) => {
    // Here preventing the default means that the page is left in spite of its objection.
    if (guard.unload()) event.preventDefault();
  });
  // Windows ends the session at once; the page saves in the time that is left.
  window.on('query-session-end', () => {
    void guard.sessionEnd();
  });
  // macOS and Linux wait for a program that asks for it. Its event can be prevented, although the
  // type declarations give it no argument.
  parts.powerMonitor.on('shutdown', (event?: { preventDefault(): void }) => {
    event?.preventDefault();
    void guard.sessionEnd().then(() => parts.app.quit());
  });
}

/**
 * Reloads the page when its process has ended unasked; the host has kept the note. A page that stops
 * again and again is left, and the reader decides.
 */
export function surviveCrashes(
  parts: ElectronParts,
  window: BrowserWindow,
  page: PageState,
  tools: { readonly nowMs: () => number; readonly report: (error: unknown) => void },
): void {
  const decide = crashPolicy();
  window.webContents.on('render-process-gone', (_event, details) => {
    page.report(undefined);
    const step = decide(details.reason, tools.nowMs());
    if (step === 'nothing') return;
    tools.report(new Error(`page ended: ${details.reason}`));
    if (step === 'reload') window.webContents.reload();
    else giveUp().catch(tools.report);
  });

  async function giveUp(): Promise<void> {
    const answer = await parts.dialog.showMessageBox(window, {
      type: 'error',
      message: 'The page has stopped several times in a minute',
      detail: 'The note is kept up to the last change. Load the page again, or quit.',
      buttons: ['Load again', 'Quit'],
      defaultId: 0,
      cancelId: 1,
      noLink: true,
    });
    if (answer.response === 0) window.webContents.reload();
    else parts.app.quit();
  }
}

/** Brings the window to the front, also out of the task bar. */
export function focusWindow(window: BrowserWindow): void {
  if (window.isMinimized()) window.restore();
  window.show();
  window.focus();
}
