import type { Kernel } from '../../core/note/index.js';

/** One slice that is still to be read. */
export interface SliceTask {
  readonly kernel: Kernel;
  readonly index: number;
}

/** What is still to be read of one stack, and the slice that its plate shows. */
export interface Waiting {
  readonly indices: ReadonlySet<number>;
  readonly shown: number;
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
    const { indices, shown } = waiting[kernel];
    for (const index of indices) {
      const distance = Math.abs(index - shown);
      if (best === undefined || distance < best.distance)
        best = { task: { kernel, index }, distance };
    }
  }
  return best?.task;
}
