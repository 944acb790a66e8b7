import { dot, gridNormal, type Vec3 } from '../../core/geometry/index.js';
import { findSliceAt } from '../../core/region/index.js';
import type { Stack, StackSlice } from '../../core/stack/index.js';

/**
 * Index of the slice at a position along the stack, under the rule that regions are measured by: the nearest
 * slice, if it lies within half the stack's spacing; undefined where the stack has no slice.
 */
export function sliceIndexAt(stack: Stack, alongMm: number): number | undefined {
  const found = findSliceAt(alongMm, stack);
  return found.ok ? found.value.sliceIndex : undefined;
}

/** Index of the slice nearest to a position, however far it is. */
export function nearestSlice(slices: readonly StackSlice[], alongMm: number): number {
  let low = 0;
  let high = slices.length - 1;
  if (alongMm === Number.POSITIVE_INFINITY) return high;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((slices[middle]?.alongMm ?? 0) <= alongMm) low = middle;
    else high = middle;
  }
  const below = Math.abs((slices[low]?.alongMm ?? 0) - alongMm);
  const above = Math.abs((slices[high]?.alongMm ?? 0) - alongMm);
  return above < below ? high : low;
}

/** Unit normal of a stack's slices; positions along the stack are measured on it. */
export function stackNormal(stack: Stack): Vec3 {
  return gridNormal(stack.slices[0].image.grid);
}

/** Cosine above which two normals count as parallel: half a degree. */
const PARALLEL = Math.cos(Math.PI / 360);

/**
 * The position along `to` of the slice plane that lies at `alongMm` along `from`. Undefined when the two
 * stacks are not parallel, because then no slice of one lies in a slice of the other.
 */
export function positionIn(from: Stack, alongMm: number, to: Stack): number | undefined {
  if (from === to) return alongMm;
  const cosine = dot(stackNormal(from), stackNormal(to));
  if (cosine >= PARALLEL) return alongMm;
  return cosine <= -PARALLEL ? -alongMm : undefined;
}
