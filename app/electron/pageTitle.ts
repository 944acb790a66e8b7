import type { ShellState } from '../host/contract.js';

/** Title of the window; a dot before it marks changes that are not saved. */
export function pageTitle(state: ShellState | undefined): string {
  const title = state?.title.trim() || 'Diptych';
  return state?.unsaved === true ? `• ${title}` : title;
}
