import { dot, type SliceGrid } from '../geometry/index.js';
import type { Stack } from '../stack/index.js';
import type { ReadSlice } from './contract.js';
import { type Axes, axesOf, type Plane, planeOf } from './sharpnessPlane.js';

/** The same height of both stacks. */
export interface PlanePair {
  readonly first: Plane;
  readonly second: Plane;
}

/** Slices at the same heights of both stacks, or why there are none. */
export type CommonSlices =
  | { readonly axes: Axes; readonly pairs: readonly PlanePair[] }
  | { readonly reason: string };

/** Directions differ by less than this: about 0.3°, a pixel over a field of view. */
const SAME_DIRECTION = 1 - 1e-5;

/**
 * Reads slices of both stacks at `count` heights, spread evenly over the range that they share, its ends left out.
 * Of the stack with the wider steps the nearest slice is taken, of the other the one nearest to that.
 */
export async function readCommonSlices(
  first: Stack,
  second: Stack,
  read: ReadSlice,
  count: number,
): Promise<CommonSlices> {
  const reason = reasonAgainst(first, second);
  if (reason !== undefined) return { reason };
  const axes = axesOf(first.slices[0].image.grid);
  const pairs: PlanePair[] = [];
  for (const [a, b] of commonHeights(first, second, axes, count)) {
    const [storedA, storedB] = await Promise.all([read(first, a), read(second, b)]);
    const [sliceA, sliceB] = [first.slices[a], second.slices[b]];
    if (!storedA || !storedB || !sliceA || !sliceB) continue;
    const planeA = planeOf(sliceA, storedA, axes);
    const planeB = planeOf(sliceB, storedB, axes);
    if (planeA && planeB) pairs.push({ first: planeA, second: planeB });
  }
  return pairs.length > 0 ? { axes, pairs } : { reason: 'no slices in common could be read' };
}

function reasonAgainst(first: Stack, second: Stack): string | undefined {
  const [a, b] = [first.slices[0].image, second.slices[0].image];
  if (first.unit !== 'HU' || second.unit !== 'HU') return 'the values are not HU';
  const [frameA, frameB] = [a.acquisition.frameOfReferenceUid, b.acquisition.frameOfReferenceUid];
  if (frameA !== undefined && frameB !== undefined && frameA !== frameB)
    return 'positions of the two can’t be compared';
  return sameDirections(a.grid, b.grid) ? undefined : 'the slices are turned against each other';
}

function sameDirections(a: SliceGrid, b: SliceGrid): boolean {
  return (
    dot(a.rowDirection, b.rowDirection) > SAME_DIRECTION &&
    dot(a.columnDirection, b.columnDirection) > SAME_DIRECTION
  );
}

/** Slice numbers of both stacks that lie at one height, each pair once. */
function commonHeights(
  first: Stack,
  second: Stack,
  { z }: Axes,
  count: number,
): readonly (readonly [number, number])[] {
  const heights = (stack: Stack): readonly number[] =>
    stack.slices.map(({ image }) => dot(image.grid.positionMm, z));
  const [a, b] = [heights(first), heights(second)];
  const from = Math.max(Math.min(...a), Math.min(...b));
  const to = Math.min(Math.max(...a), Math.max(...b));
  const reachMm = Math.max(stepOf(first), stepOf(second)) / 2 + 1e-3;
  const coarseIsFirst = stepOf(first) >= stepOf(second);
  const found = new Map<string, readonly [number, number]>();
  for (let index = 0; index < count; index += 1) {
    const wanted = from + ((to - from) * (index + 0.5)) / count;
    const [coarse, fine] = coarseIsFirst ? [a, b] : [b, a];
    const one = nearest(coarse, wanted);
    const other = nearest(fine, coarse[one] ?? wanted);
    if (Math.abs((coarse[one] ?? 0) - (fine[other] ?? 0)) > reachMm) continue;
    const pair = coarseIsFirst ? ([one, other] as const) : ([other, one] as const);
    found.set(pair.join(), pair);
  }
  return [...found.values()];
}

/** Distance between slices; the thickness where there is one slice. */
function stepOf({ sliceSpacingMm, slices }: Stack): number {
  return sliceSpacingMm ?? slices[0].image.acquisition.thicknessMm ?? 0;
}

function nearest(heights: readonly number[], wanted: number): number {
  let best = 0;
  heights.forEach((height, index) => {
    if (Math.abs(height - wanted) < Math.abs((heights[best] ?? Infinity) - wanted)) best = index;
  });
  return best;
}
