import { alongNormal } from '../geometry/index.js';
import { type Result, refuse, success } from '../result.js';
import type { Stack } from '../stack/index.js';
import { checkParallel, shapeCentre } from './plane.js';
import type { Shape } from './shape.js';

/** Positions are rounded in files; a place this near to half the spacing still counts, mm. */
const ROUNDING_MM = 1e-6;

/** The slice of a stack on which a shape is measured. */
export interface FoundSlice {
  readonly sliceIndex: number;
  /** From the shape's plane to the slice, along the normal, mm. */
  readonly offsetMm: number;
}

/**
 * The slice nearest to a shape, if it lies within half the stack's spacing; of two equally near ones the first.
 * A stack of one slice reaches half its thickness.
 *
 * @returns refused when the shape leans against the slices or lies on none of them
 */
export function findSlice(shape: Shape, stack: Stack): Result<FoundSlice> {
  const { grid } = stack.slices[0].image;
  const parallel = checkParallel(shape, grid);
  if (!parallel.ok) return parallel;
  return findSliceAt(alongNormal(grid, shapeCentre(shape)), stack);
}

/** The slice nearest to a position along the stack's normal, mm, under the rule of {@link findSlice}. */
export function findSliceAt(alongMm: number, stack: Stack): Result<FoundSlice> {
  let sliceIndex = 0;
  let offsetMm = Infinity;
  stack.slices.forEach((slice, index) => {
    const offset = slice.alongMm - alongMm;
    if (Math.abs(offset) < Math.abs(offsetMm) - ROUNDING_MM) {
      sliceIndex = index;
      offsetMm = offset;
    }
  });
  const thickness = stack.slices[0].image.acquisition.thicknessMm ?? 0;
  const reachMm = (stack.sliceSpacingMm ?? thickness) / 2;
  if (Math.abs(offsetMm) <= reachMm + ROUNDING_MM) return success({ sliceIndex, offsetMm });
  return refuse(
    'no-slice-here',
    `No slice here: the nearest is ${Math.abs(offsetMm).toFixed(2)} mm away, and this stack's slices reach ${reachMm.toFixed(2)} mm.`,
  );
}
