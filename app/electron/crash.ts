/** How often a page may stop within the window before reloading it is given up. */
export const MOST_RELOADS = 3;
export const RELOAD_WINDOW_MS = 60_000;

/** What to do about a page whose process has ended. */
export type AfterCrash = 'nothing' | 'reload' | 'give-up';

/**
 * Decides after each end of the page's process. It is reloaded, since the host has kept the note up
 * to the last change; a page that keeps stopping is given up, so that it can't go round for ever.
 */
export function crashPolicy(): (reason: string, nowMs: number) => AfterCrash {
  let recentMs: readonly number[] = [];
  return (reason, nowMs) => {
    if (reason === 'clean-exit') return 'nothing';
    recentMs = [...recentMs.filter((ms) => nowMs - ms < RELOAD_WINDOW_MS), nowMs];
    return recentMs.length > MOST_RELOADS ? 'give-up' : 'reload';
  };
}
