import { alongNormal, type Vec3 } from '../../core/geometry/index.js';
import type { Stack, StackSlice } from '../../core/stack/index.js';
import type { Volume } from '../volumes/volume.js';
import type { StackPart } from './fitRequest.js';

/** Slices around a place, with the index of the first in their stack. */
export interface PartOfStack extends StackPart {
  readonly from: number;
  /** Slices of the part whose pixels are not there, as indices into the stack. */
  readonly lacking: readonly number[];
}

/** The slices of a volume within a distance of a place along their normal; undefined where there are none. */
export function stackPart(
  { stack, slice }: Pick<Volume, 'stack' | 'slice'>,
  placeMm: Vec3,
  reachMm: number,
): PartOfStack | undefined {
  const along = alongNormal(stack.slices[0].image.grid, placeMm);
  const indices = stack.slices.flatMap(({ alongMm }, index) =>
    Math.abs(alongMm - along) <= reachMm ? [index] : [],
  );
  const [from] = indices;
  const slices = indices.flatMap((index) => stack.slices[index] ?? []);
  if (from === undefined || !isFilled(slices)) return undefined;
  const stored = indices.map((index) => slice(index));
  return {
    stack: { ...stack, slices },
    stored,
    from,
    lacking: indices.filter((_, place) => stored[place] === undefined),
  };
}

function isFilled(slices: readonly StackSlice[]): slices is Stack['slices'] {
  return slices.length > 0;
}
