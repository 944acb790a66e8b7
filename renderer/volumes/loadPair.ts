import type { Kernel } from '../../core/note/index.js';
import type { FrameRequest } from '../host/client.js';
import type { DecodeAnswer, DecodeRequest } from './decodeRequest.js';
import { nextTask, type SliceTask } from './loadOrder.js';
import { type StoredSlice, sliceOffsetBytes, type Volume } from './volume.js';
import type { WorkerPool } from './workerPool.js';

/** The volumes of the plates; no sharp one when a single stack is read. */
export type PairVolumes = { readonly soft: Volume; readonly sharp: Volume | undefined };

export interface LoadPairOptions {
  readonly volumes: PairVolumes;
  readonly pool: Pick<WorkerPool, 'size' | 'decode'>;
  readonly frame: (fileId: number) => FrameRequest;
  /** The slice index that a plate shows now: what is near to it is read first. */
  readonly shown: (kernel: Kernel) => number;
  readonly onSlice: (kernel: Kernel, index: number) => void;
  readonly onGap: (kernel: Kernel, index: number, text: string) => void;
  readonly signal: AbortSignal;
}

/**
 * Reads both volumes, each slice once, the nearest to what is shown first. A slice that can't be read is a
 * gap with its sentence and stops nothing. Ends when all is read or the signal gives it up.
 */
export async function loadPair(options: LoadPairOptions): Promise<void> {
  const { volumes, signal } = options;
  const waiting = { soft: indicesOf(volumes.soft), sharp: indicesOf(volumes.sharp) };
  const underWay = { soft: 0, sharp: 0 };

  const take = (): SliceTask | undefined => {
    const task = nextTask(
      {
        soft: { indices: waiting.soft, shown: options.shown('soft') },
        sharp: { indices: waiting.sharp, shown: options.shown('sharp') },
      },
      underWay,
    );
    if (task !== undefined) waiting[task.kernel].delete(task.index);
    return task;
  };

  const lane = async (): Promise<void> => {
    for (let task = take(); task !== undefined && !signal.aborted; task = take()) {
      const volume = volumes[task.kernel];
      if (volume === undefined) continue;
      underWay[task.kernel] += 1;
      const answer = await options.pool.decode(requestOf(volume, task.index, options.frame));
      underWay[task.kernel] -= 1;
      if (signal.aborted) return;
      if (answer.ok) {
        receive(volume, task.index, answer);
        options.onSlice(task.kernel, task.index);
      } else {
        options.onGap(task.kernel, task.index, answer.text);
      }
    }
  };
  await Promise.all(Array.from({ length: options.pool.size }, lane));
}

function indicesOf(volume: Volume | undefined): Set<number> {
  return new Set(volume?.stack.slices.keys() ?? []);
}

function requestOf(
  volume: Volume,
  index: number,
  frame: (fileId: number) => FrameRequest,
): DecodeRequest {
  const slice = volume.stack.slices[index];
  if (slice === undefined) throw new RangeError(`invalid slice index: ${index}`);
  const { rows, columns } = slice.image.grid;
  const shared =
    typeof SharedArrayBuffer !== 'undefined' && volume.buffer instanceof SharedArrayBuffer;
  return {
    frame: frame(slice.fileId),
    sopInstanceUid: slice.image.sopInstanceUid,
    rows,
    columns,
    target: shared
      ? { buffer: volume.buffer as SharedArrayBuffer, offsetBytes: sliceOffsetBytes(volume, index) }
      : undefined,
  };
}

function receive(
  volume: Volume,
  index: number,
  answer: Extract<DecodeAnswer, { readonly ok: true }>,
): StoredSlice {
  if (answer.values !== undefined) {
    new Uint16Array(volume.buffer, sliceOffsetBytes(volume, index), volume.slicePixels).set(
      new Uint16Array(answer.values),
    );
  }
  return volume.markRead(index);
}
