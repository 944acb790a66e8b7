import type { Kernel } from '../../core/note/index.js';

/** One slice that is still to be read. */
export interface SliceTask {
  readonly kernel: Kernel;
  readonly index: number;
}

/** What is still to be read of one stack, the slice that its plate shows, and the slices that there is room for. */
export interface Waiting {
  readonly indices: ReadonlySet<number>;
  readonly shown: number;
  /** First and last slice to be held; all of them where it is left out. */
  readonly window?: SliceWindow;
}

/** Neighbouring slices, both ends included. */
export interface SliceWindow {
  readonly from: number;
  readonly to: number;
}

/** The slices to hold of a stack that there is not room for: those around the shown one. */
export function windowAround(shown: number, capacity: number, slices: number): SliceWindow {
  const last = Math.max(slices - capacity, 0);
  const from = Math.min(Math.max(shown - Math.floor(capacity / 2), 0), last);
  return { from, to: from + Math.min(capacity, slices) - 1 };
}

export function isWithin(index: number, { from, to }: SliceWindow): boolean {
  return index >= from && index <= to;
}

/**
 * The slice to read next: the one nearest to what its plate shows. At the same distance the stack that has
 * fewer slices under way comes first, so that the first paired image is whole before anything else is read.
 */
export function nextTask(
  waiting: { readonly [K in Kernel]: Waiting },
  underWay: { readonly [K in Kernel]: number },
): SliceTask | undefined {
  const first = underWay.sharp < underWay.soft ? 'sharp' : 'soft';
  const kernels: readonly Kernel[] = first === 'soft' ? ['soft', 'sharp'] : ['sharp', 'soft'];
  let best: { readonly task: SliceTask; readonly distance: number } | undefined;
  for (const kernel of kernels) {
    const { indices, shown, window } = waiting[kernel];
    for (const index of indices) {
      if (window !== undefined && !isWithin(index, window)) continue;
      const distance = Math.abs(index - shown);
      if (best === undefined || distance < best.distance)
        best = { task: { kernel, index }, distance };
    }
  }
  return best?.task;
}
