import type { Presence } from '../host/presence.js';

/** Why the program ends. */
export type EndReason = 'window closed' | 'page gone' | 'no page came' | 'signal';

/** A page that is loaded anew is away for a moment; only after this long is it gone, ms. */
export const GRACE_MS = 10_000;

/** So long a window that was opened may take until its page asks for something, ms. */
export const FIRST_PAGE_MS = 60_000;

/** The watch over the pages of a program that opened a window. */
export interface Lifetime {
  /** Resolves once, with the first reason to end. */
  readonly ended: Promise<EndReason>;
  end(reason: EndReason): void;
  isOver(): boolean;
  /** From now on as without a window: only `end` ends it. */
  serveOn(): void;
}

/**
 * Watches how many pages are open. With `window`, the program ends when no page has come for a minute
 * and when the last one has been gone for ten seconds; without, it serves until it is told to end.
 */
export function watchLifetime(
  presence: Presence,
  { window }: { readonly window: boolean },
): Lifetime {
  let timer: NodeJS.Timeout | undefined;
  let unwatch = (): void => {};
  let resolve: (reason: EndReason) => void = () => {};
  const ended = new Promise<EndReason>((settle) => {
    resolve = settle;
  });
  const serveOn = (): void => {
    clearTimeout(timer);
    unwatch();
  };
  let over = false;
  const end = (reason: EndReason): void => {
    over = true;
    serveOn();
    resolve(reason);
  };
  const endAfter = (delayMs: number, reason: EndReason): void => {
    clearTimeout(timer);
    timer = setTimeout(() => end(reason), delayMs);
  };
  if (window) {
    if (presence.count === 0) endAfter(FIRST_PAGE_MS, 'no page came');
    unwatch = presence.watch((count) => {
      if (count === 0) endAfter(GRACE_MS, 'page gone');
      else clearTimeout(timer);
    });
  }
  return { ended, end, serveOn, isOver: () => over };
}
