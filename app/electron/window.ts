import type { BrowserWindowConstructorOptions, Session } from 'electron';
import { SMALLEST, type WindowPlace } from './windowPlace.js';

/** Colour of the window before the page has painted, so that it never flashes white. */
export const BACKGROUND = { dark: '#1b1c1e', light: '#f4f4f2' } as const;

/** What differs from window to window. */
export interface WindowSetup {
  readonly place: WindowPlace;
  /** Path of the built preload script. */
  readonly preload: string;
  /** Path of the window's icon; Linux takes it from here, the other systems from the program. */
  readonly icon: string;
  readonly session: Session;
  readonly dark: boolean;
  /** The developer tools exist only in an unpackaged app. */
  readonly developerTools: boolean;
}

/**
 * Options of the one window. The safe values are written out although most are defaults today, so
 * that a change of defaults can't undo them. Hidden until 'ready-to-show'.
 */
export function windowOptions(setup: WindowSetup): BrowserWindowConstructorOptions {
  return {
    ...setup.place.bounds,
    minWidth: Math.min(SMALLEST.width, setup.place.bounds.width),
    minHeight: Math.min(SMALLEST.height, setup.place.bounds.height),
    show: false,
    title: 'Diptych',
    icon: setup.icon,
    backgroundColor: setup.dark ? BACKGROUND.dark : BACKGROUND.light,
    webPreferences: {
      preload: setup.preload,
      session: setup.session,
      sandbox: true,
      contextIsolation: true,
      nodeIntegration: false,
      nodeIntegrationInWorker: false,
      nodeIntegrationInSubFrames: false,
      webSecurity: true,
      webviewTag: false,
      // Its dictionaries would be downloaded.
      spellcheck: false,
      devTools: setup.developerTools,
      // A dropped file is the page's to handle, never a place to go.
      navigateOnDragDrop: false,
    },
  };
}

/** The parts of Electron's window that showing needs. */
export interface ShowableWindow {
  once(event: 'ready-to-show', listener: () => void): unknown;
  on(event: 'page-title-updated', listener: (event: { preventDefault(): void }) => void): unknown;
  maximize(): void;
  setFullScreen(on: boolean): void;
  show(): void;
}

/** Shows the window once the page has painted, and keeps its title the shell's own. */
export function showWhenReady(window: ShowableWindow, place: WindowPlace): void {
  window.on('page-title-updated', (event) => event.preventDefault());
  window.once('ready-to-show', () => {
    if (place.maximised) window.maximize();
    window.show();
    // Not an option of the window: 'fullscreen: false' there takes the button away on macOS.
    if (place.fullScreen) window.setFullScreen(true);
  });
}
