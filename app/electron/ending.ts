import type { ElectronParts } from './parts.js';

/** How long the end of the app waits for writes that are under way, in ms. */
export const SETTLE_LIMIT_MS = 5_000;

/**
 * Quits with the last window, and not before everything that was to be written is on the disk; a
 * write that hangs can't hold the app for ever.
 */
export function endProperly(
  app: ElectronParts['app'],
  settled: () => Promise<void>,
  report: (error: unknown) => void,
): void {
  let done = false;
  app.on('window-all-closed', () => app.quit());
  app.on('will-quit', (event) => {
    if (done) return;
    event.preventDefault();
    const limit = new Promise<void>((resolve) => setTimeout(resolve, SETTLE_LIMIT_MS));
    Promise.race([settled(), limit])
      .catch(report)
      .finally(() => {
        done = true;
        app.quit();
      });
  });
}
