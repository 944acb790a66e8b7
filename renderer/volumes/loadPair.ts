import { isReadWhole } from '../../core/dicom/isReadWhole.js';
import type { Kernel } from '../../core/note/index.js';
import type { FrameRequest } from '../host/client.js';
import type { DecodeRequest } from './decodeRequest.js';
import { isWithin, nextTask, type SliceTask, type Waiting, windowAround } from './loadOrder.js';
import { isWhole, type Volume } from './volume.js';
import type { WorkerPool } from './workerPool.js';

/** The volumes of the plates; no sharp one when a single stack is read. */
export type PairVolumes = { readonly soft: Volume; readonly sharp: Volume | undefined };

export interface LoadPairOptions {
  readonly volumes: PairVolumes;
  readonly pool: Pick<WorkerPool, 'size' | 'decode'>;
  /** Where a file's bytes are, or those of one of its frames. */
  readonly frame: (fileId: number, frame?: number) => FrameRequest;
  /** The slice index that a plate shows now: what is near to it is read first. */
  readonly shown: (kernel: Kernel) => number;
  /** A slice has come. A passing one was asked for and is dropped again as soon as this returns. */
  readonly onSlice: (kernel: Kernel, index: number, passing: boolean) => void;
  readonly onGap: (kernel: Kernel, index: number, text: string) => void;
  readonly signal: AbortSignal;
}

/** The reading of a pair, which goes on by itself. */
export interface PairLoading {
  /** All is read, or the signal has given it up. A volume that is held in part is never done: it follows the plates. */
  readonly done: Promise<void>;
  /** The plates show other slices: reads what is near to them, where it is not there. */
  look(): void;
  /** Reads a slice that there is no room for, once, after those around the plates. */
  ask(kernel: Kernel, index: number): void;
}

/** What is known of one stack's slices. */
interface Progress {
  readonly volume: Volume;
  /** Neither read nor under way, nor a gap. */
  readonly waiting: Set<number>;
  readonly asked: Set<number>;
  underWay: number;
}

/**
 * Reads both volumes, the nearest slices to what is shown first. A slice that can't be read is a gap with its
 * sentence and stops nothing. Where a volume holds only a part of its stack, the slices around the shown one
 * are kept, others make room for them and are read again when they are needed.
 */
export function loadPair(options: LoadPairOptions): PairLoading {
  const { volumes, signal, pool } = options;
  const progress = { soft: progressOf(volumes.soft), sharp: progressOf(volumes.sharp) };
  const all = [progress.soft, progress.sharp].filter((one) => one !== undefined);
  const isFollowing = !all.every(({ volume }) => isWhole(volume));
  let lanes = 0;

  const waitingOf = (kernel: Kernel): Waiting => {
    const shown = options.shown(kernel);
    const { volume, waiting } = progress[kernel] ?? NOTHING;
    if (volume === undefined || isWhole(volume)) return { indices: waiting, shown };
    const window = windowAround(shown, volume.capacity, volume.stack.slices.length);
    return { indices: waiting, shown, window };
  };

  const take = (): SliceTask | undefined => {
    if (signal.aborted) return undefined;
    const underWay = {
      soft: progress.soft?.underWay ?? 0,
      sharp: progress.sharp?.underWay ?? 0,
    };
    const near = nextTask({ soft: waitingOf('soft'), sharp: waitingOf('sharp') }, underWay);
    const task = near ?? askedTask(progress);
    if (task !== undefined) {
      progress[task.kernel]?.waiting.delete(task.index);
      progress[task.kernel]?.asked.delete(task.index);
    }
    return task;
  };

  const read = async ({ kernel, index }: SliceTask): Promise<void> => {
    const mine = progress[kernel];
    if (mine === undefined) throw new Error(`no volume of kernel: ${kernel}`);
    mine.underWay += 1;
    const answer = await pool.decode(requestOf(mine.volume, index, options.frame));
    mine.underWay -= 1;
    if (signal.aborted) return;
    if (!answer.ok) return options.onGap(kernel, index, answer.text);
    mine.volume.receive(index, answer.values);
    const { window, shown } = waitingOf(kernel);
    const passing = window !== undefined && !isWithin(index, window);
    options.onSlice(kernel, index, passing);
    if (passing) giveUp(mine, index);
    else makeRoom(mine, shown);
  };

  let ended = (): void => {};
  let failed = (_error: unknown): void => {};
  const done = new Promise<void>((resolve, reject) => {
    ended = () => {
      if (lanes === 0 && (signal.aborted || !isFollowing)) resolve();
    };
    failed = reject;
  });
  const lane = async (): Promise<void> => {
    for (let task = take(); task !== undefined; task = take()) await read(task);
  };
  const look = (): void => {
    while (lanes < pool.size && !signal.aborted) {
      lanes += 1;
      lane()
        .finally(() => {
          lanes -= 1;
        })
        .then(ended, failed);
    }
  };
  signal.addEventListener('abort', ended, { once: true });
  look();
  return {
    done,
    look: () => {
      if (isFollowing) look();
    },
    ask: (kernel, index) => {
      const mine = progress[kernel];
      if (mine === undefined || isWhole(mine.volume) || !mine.waiting.has(index)) return;
      mine.asked.add(index);
      look();
    },
  };
}

const NOTHING = { volume: undefined, waiting: new Set<number>() } as const;

function progressOf(volume: Volume | undefined): Progress | undefined {
  if (volume === undefined) return undefined;
  const waiting = new Set(volume.stack.slices.keys());
  return { volume, waiting, asked: new Set(), underWay: 0 };
}

function askedTask(
  progress: {
    readonly [K in Kernel]: Progress | undefined;
  },
): SliceTask | undefined {
  for (const kernel of ['soft', 'sharp'] as const) {
    for (const index of progress[kernel]?.asked ?? []) return { kernel, index };
  }
  return undefined;
}

/** Drops the slices farthest from the shown one until no more are held than there is room for. */
function makeRoom(progress: Progress, shown: number): void {
  const { volume } = progress;
  while (volume.size > volume.capacity) {
    const farthest = [...volume.held()].reduce((a, b) =>
      Math.abs(b - shown) > Math.abs(a - shown) ? b : a,
    );
    giveUp(progress, farthest);
  }
}

function giveUp({ volume, waiting }: Progress, index: number): void {
  volume.drop(index);
  waiting.add(index);
}

function requestOf(volume: Volume, index: number, frame: LoadPairOptions['frame']): DecodeRequest {
  const slice = volume.stack.slices[index];
  if (slice === undefined) throw new RangeError(`invalid slice index: ${index}`);
  const { image } = slice;
  return {
    frame: isReadWhole(image) ? frame(slice.fileId) : frame(slice.fileId, image.frame),
    image,
    target: volume.target(index),
  };
}
