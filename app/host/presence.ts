/** How many pages are open. Each holds one stream open as long as it lives. */
export interface Presence {
  readonly count: number;
  /** A page came. Returns the function that tells that it has gone; telling it twice counts once. */
  enter(): () => void;
  /** Returns the function that ends the watch. */
  watch(listener: (count: number) => void): () => void;
}

/** A count that starts with nobody there. */
export function createPresence(): Presence {
  let count = 0;
  const listeners = new Set<(count: number) => void>();
  const change = (by: number): void => {
    count += by;
    for (const listener of listeners) listener(count);
  };
  return {
    get count() {
      return count;
    },
    enter() {
      let here = true;
      change(1);
      return () => {
        if (!here) return;
        here = false;
        change(-1);
      };
    },
    watch(listener) {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}
