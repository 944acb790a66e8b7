import type { Kernel } from '../../core/note/index.js';
import { type Result, success } from '../../core/result.js';
import type { Stack } from '../../core/stack/index.js';
import type { HostClient } from '../host/client.js';
import { nearestSlice } from '../link/slicePosition.js';
import type { AppState, LoadingState, PairState } from '../state/appState.js';
import { platesOnSlices } from '../state/changes/cut.js';
import { NOTHING_LOADED } from '../state/initialState.js';
import { shownSlice } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import { loadPair, type PairLoading, type PairVolumes } from '../volumes/loadPair.js';
import { memoryBudgets } from '../volumes/memoryBudget.js';
import { createVolume, isWhole, type Volume } from '../volumes/volume.js';
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

/**
 * Makes room for both stacks and begins to read them; the volumes fill while they are used. A pair that is
 * too large for the memory of the machine is held in part, around the slices that the plates show.
 */
export function loadVolumes(options: LoadVolumesOptions): Result<PairVolumes> {
  const { pair, store, signal } = options;
  let loading: PairLoading | undefined;
  const stacks = pair.sharp === undefined ? [pair.soft] : [pair.soft, pair.sharp];
  const [softBytes, sharpBytes] = memoryBudgets(stacks, deviceMemoryGib());
  const room = (stack: Stack, kernel: Kernel, budgetBytes = 0): Result<Volume> =>
    createVolume(stack, { budgetBytes, onAsk: (index) => loading?.ask(kernel, index) });
  const soft = room(pair.soft, 'soft', softBytes);
  if (!soft.ok) return soft;
  const sharp = pair.sharp === undefined ? undefined : room(pair.sharp, 'sharp', sharpBytes);
  if (sharp !== undefined && !sharp.ok) return sharp;
  const volumes: PairVolumes = { soft: soft.value, sharp: sharp?.value };
  const pool = createWorkerPool();
  const progress = createProgress(options, volumes);
  loading = loadPair({
    volumes,
    pool,
    frame: (fileId, frame) => options.client.frame(options.grant, fileId, frame),
    shown: (kernel) => shownIndex(store.now(), kernel),
    onSlice: progress.slice,
    onGap: progress.gap,
    signal,
  });
  const { look } = loading;
  const unwatch = store.watch((_name, { plates }, before) => {
    if (plates !== before.plates) look();
  });
  signal.addEventListener('abort', () => pool.close(), { once: true });
  void loading.done.finally(() => {
    unwatch();
    pool.close();
    progress.end();
  });
  if (!isWhole(volumes.soft) || (volumes.sharp !== undefined && !isWhole(volumes.sharp))) {
    store.change('Say that a part is held', (state) => ({
      ...state,
      message: state.message ?? { tone: 'plain', text: HELD_IN_PART },
    }));
  }
  return success(volumes);
}

const HELD_IN_PART =
  'This pair is larger than the memory that may be used. Slices are read again as you scroll.';

/** Not in every browser, and only where the page counts as secure. */
function deviceMemoryGib(): number | undefined {
  const { deviceMemory } = navigator as { readonly deviceMemory?: unknown };
  return typeof deviceMemory === 'number' && deviceMemory > 0 ? deviceMemory : undefined;
}

function shownIndex(state: AppState, kernel: Kernel): number {
  const stack = state.pair?.[kernel];
  const { alongMm } = platesOnSlices(state)[kernel];
  return stack === undefined ? 0 : nearestSlice(stack.slices, alongMm);
}

/** Gathers what was read and tells the store of it, at once where a shown slice is concerned. */
function createProgress({ store, onSlices, signal }: LoadVolumesOptions, volumes: PairVolumes) {
  const gaps: { [K in Kernel]: ReadonlyMap<number, string> } = {
    soft: NOTHING_LOADED.gaps,
    sharp: NOTHING_LOADED.gaps,
  };
  let timer: ReturnType<typeof setTimeout> | undefined;
  const loadingOf = (kernel: Kernel): LoadingState => {
    const volume = volumes[kernel];
    if (volume === undefined) return NOTHING_LOADED;
    const total = volume.capacity;
    return {
      done: Math.min(volume.size + gaps[kernel].size, total),
      total,
      gaps: gaps[kernel],
    };
  };
  const tell = (): void => {
    clearTimeout(timer);
    timer = undefined;
    // What was given up has nothing to tell any more: another pair may be on the plates.
    if (signal.aborted) return;
    const loading = { soft: loadingOf('soft'), sharp: loadingOf('sharp') };
    store.change('Slices read', (state) => ({ ...state, loading }));
    onSlices();
  };
  const tellOf = (kernel: Kernel, index: number): void => {
    const state = store.now();
    if (state.cut === undefined && shownSlice(state, kernel)?.index === index) tell();
    else timer ??= setTimeout(tell, TELL_EVERY_MS);
  };
  tell();
  return {
    slice: (kernel: Kernel, index: number, passing: boolean) => {
      // It is dropped as soon as this returns: what is to be measured on it is measured now.
      if (passing) tell();
      else tellOf(kernel, index);
    },
    gap: (kernel: Kernel, index: number, text: string) => {
      gaps[kernel] = new Map(gaps[kernel]).set(index, text);
      tellOf(kernel, index);
    },
    end: tell,
  };
}
