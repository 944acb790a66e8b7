import type { ShellState } from '../host/contract.js';

/** What the page has last said of itself, and who wants to know. */
export interface PageState {
  /** Undefined until the page has reported, and again after it has gone. */
  current(): ShellState | undefined;
  report(state: ShellState | undefined): void;
  onReport(listener: (state: ShellState | undefined) => void): () => void;
}

export function pageState(): PageState {
  let state: ShellState | undefined;
  const listeners = new Set<(state: ShellState | undefined) => void>();
  return {
    current: () => state,
    report: (next) => {
      state = next;
      for (const listener of [...listeners]) listener(next);
    },
    onReport: (listener) => {
      listeners.add(listener);
      return () => {
        listeners.delete(listener);
      };
    },
  };
}

/** How long the page may take to save before the reader is asked again, in ms. */
export const SAVE_LIMIT_MS = 10_000;

/**
 * Has the page save its note and waits until it reports that nothing is unsaved. False when it does
 * not say so in time, or has gone.
 */
export function savePage(
  page: PageState,
  sendCommand: (id: string) => void,
  limitMs: number = SAVE_LIMIT_MS,
): Promise<boolean> {
  if (page.current()?.unsaved !== true) return Promise.resolve(true);
  return new Promise((resolve) => {
    const finish = (saved: boolean): void => {
      clearTimeout(timer);
      unsubscribe();
      resolve(saved);
    };
    const timer = setTimeout(() => finish(false), limitMs);
    const unsubscribe = page.onReport((state) => {
      if (state === undefined) finish(false);
      else if (!state.unsaved) finish(true);
    });
    sendCommand('note.save');
  });
}
