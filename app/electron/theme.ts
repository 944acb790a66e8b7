import type { Settings } from '../host/contract.js';

/** The part of Electron's nativeTheme that is used. */
export interface ThemePart {
  themeSource: 'system' | 'dark' | 'light';
}

/**
 * Lets menus, dialogs and the page's prefers-color-scheme follow the reader's setting. It is set
 * only when it differs: setting it repaints every window. Image grey levels never depend on it.
 */
export function applyTheme(nativeTheme: ThemePart, theme: Settings['theme']): void {
  if (nativeTheme.themeSource !== theme) nativeTheme.themeSource = theme;
}
