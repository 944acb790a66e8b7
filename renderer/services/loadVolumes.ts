import type { Kernel } from '../../core/note/index.js';
import { type Result, success } from '../../core/result.js';
import type { HostClient } from '../host/client.js';
import { nearestSlice } from '../link/slicePosition.js';
import type { AppState, LoadingState, PairState } from '../state/appState.js';
import { NOTHING_LOADED } from '../state/initialState.js';
import { shownSlice, stackOf } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import { loadPair, type PairVolumes } from '../volumes/loadPair.js';
import { createVolume } from '../volumes/volume.js';
import { createWorkerPool } from '../volumes/workerPool.js';

/** How often the progress of reading is told while no shown slice is concerned, ms. */
const TELL_EVERY_MS = 120;

export interface LoadVolumesOptions {
  readonly store: Store;
  readonly client: Pick<HostClient, 'frame'>;
  readonly grant: string;
  readonly pair: PairState;
  /** Called when slices have come, at the pace at which progress is told. */
  readonly onSlices: () => void;
  readonly signal: AbortSignal;
}

/** Makes room for both stacks and begins to read them; the volumes fill while they are used. */
export function loadVolumes(options: LoadVolumesOptions): Result<PairVolumes> {
  const { pair, store, signal } = options;
  const soft = createVolume(pair.soft);
  if (!soft.ok) return soft;
  const sharp = pair.sharp === undefined ? undefined : createVolume(pair.sharp);
  if (sharp !== undefined && !sharp.ok) return sharp;
  const volumes: PairVolumes = { soft: soft.value, sharp: sharp?.value };
  const pool = createWorkerPool();
  signal.addEventListener('abort', () => pool.close(), { once: true });
  const progress = createProgress(options, volumes);
  void loadPair({
    volumes,
    pool,
    frame: (fileId) => options.client.frame(options.grant, fileId),
    shown: (kernel) => shownIndex(store.now(), kernel),
    onSlice: (kernel, index) => progress.read(kernel, index, undefined),
    onGap: (kernel, index, text) => progress.read(kernel, index, text),
    signal,
  }).finally(() => {
    pool.close();
    progress.end();
  });
  return success(volumes);
}

function shownIndex(state: AppState, kernel: Kernel): number {
  const stack = stackOf(state, kernel);
  return stack === undefined ? 0 : nearestSlice(stack.slices, state.plates[kernel].alongMm);
}

/** Gathers what was read and tells the store of it, at once where a shown slice is concerned. */
function createProgress({ store, onSlices, signal }: LoadVolumesOptions, volumes: PairVolumes) {
  const counts: { [K in Kernel]: LoadingState } = {
    soft: { ...NOTHING_LOADED, total: volumes.soft.stack.slices.length },
    sharp: { ...NOTHING_LOADED, total: volumes.sharp?.stack.slices.length ?? 0 },
  };
  let timer: ReturnType<typeof setTimeout> | undefined;
  const tell = (): void => {
    clearTimeout(timer);
    timer = undefined;
    // What was given up has nothing to tell any more: another pair may be on the plates.
    if (signal.aborted) return;
    const loading = { soft: counts.soft, sharp: counts.sharp };
    store.change('Slices read', (state) => ({ ...state, loading }));
    onSlices();
  };
  tell();
  return {
    read: (kernel: Kernel, index: number, gap: string | undefined) => {
      const before = counts[kernel];
      counts[kernel] = {
        ...before,
        done: before.done + 1,
        gaps: gap === undefined ? before.gaps : new Map(before.gaps).set(index, gap),
      };
      if (shownSlice(store.now(), kernel)?.index === index) tell();
      else timer ??= setTimeout(tell, TELL_EVERY_MS);
    },
    end: tell,
  };
}
