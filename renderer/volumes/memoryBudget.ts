import type { Stack } from '../../core/stack/index.js';

/** The part of the machine's memory that the pixels of a pair may take. */
const PART = 0.4;

/** Taken where the browser does not say how much memory there is, GiB. */
const USUAL_GIB = 4;

/**
 * Bytes that the stacks of a pair may take, each by its size.
 *
 * @param deviceMemoryGib `navigator.deviceMemory`, which the browser rounds and caps (W3C Device Memory);
 *   undefined where it has none
 */
export function memoryBudgets(
  stacks: readonly Stack[],
  deviceMemoryGib: number | undefined,
): readonly number[] {
  const budget = (deviceMemoryGib ?? USUAL_GIB) * 2 ** 30 * PART;
  const sizes = stacks.map(({ slices }) => {
    const { rows, columns } = slices[0].image.grid;
    return slices.length * rows * columns * 2;
  });
  const all = sizes.reduce((sum, size) => sum + size, 0);
  return sizes.map((size) => (budget * size) / all);
}
