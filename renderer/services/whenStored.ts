import type { Kernel } from '../../core/note/index.js';
import type { Store } from '../state/store.js';
import type { StoredSlice } from '../volumes/volume.js';

/** What a waiting for slices needs of the bench. */
export interface SliceSource {
  stored(kernel: Kernel, index: number): StoredSlice | undefined;
  /** Asks for a slice that is not there. */
  askFor(kernel: Kernel, index: number): void;
}

/** The stored values of a slice once it has been read; undefined when it can't be, or the waiting is given up. */
export function whenStored(
  store: Store,
  source: SliceSource,
  kernel: Kernel,
  index: number,
  signal: AbortSignal,
): Promise<StoredSlice | undefined> {
  return new Promise((resolve) => {
    const look = (): boolean => {
      const stored = source.stored(kernel, index);
      const isGap = store.now().loading[kernel].gaps.has(index);
      if (stored === undefined && !isGap && !signal.aborted) return false;
      resolve(stored);
      return true;
    };
    if (look()) return;
    const stop = store.watch(() => {
      if (look()) stop();
    });
    signal.addEventListener('abort', () => look() && stop(), { once: true });
    source.askFor(kernel, index);
  });
}
