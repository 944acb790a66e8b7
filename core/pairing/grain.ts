import { pixelToPatient, subtract } from '../geometry/index.js';
import type { Stack } from '../stack/index.js';
import { commonRange } from './commonRange.js';
import type { ReadSlice } from './contract.js';
import { huPlane, samplePlane } from './huPlane.js';
import { nearestSlice } from './planeReader.js';
import { squareCentre } from './registrationPlaces.js';

/** Samples along a side of the square in the middle of the field that is looked at. */
const SIZE = 96;

/**
 * How grainy one slice of a stack is: the median size of its second differences over a square in the middle of the
 * slice, HU (a robust form of Immerkær 1996, doi 10.1006/cviu.1996.0060). It serves only to look first at those pairs
 * that differ most; it is never shown and decides nothing.
 *
 * @param stepMm of the samples, the same for all stacks that are compared
 */
export async function grainHu(
  stack: Stack,
  alongMm: number,
  stepMm: number,
  read: ReadSlice,
): Promise<number | undefined> {
  const { index } = nearestSlice(stack, alongMm);
  const slice = stack.slices[index];
  const stored = slice && (await read(stack, index));
  if (slice === undefined || stored === undefined) return undefined;
  const { grid } = slice.image;
  const { rowDirection, columnDirection } = grid;
  const centreMm = pixelToPatient(grid, {
    column: (grid.columns - 1) / 2,
    row: (grid.rows - 1) / 2,
  });
  const atOrigin = {
    cornerMm: [0, 0, 0],
    rowDirection,
    columnDirection,
    stepMm,
    size: SIZE,
  } as const;
  const cornerMm = subtract(centreMm, squareCentre(atOrigin));
  const samples = samplePlane(huPlane(slice, stored), { ...atOrigin, cornerMm });
  return samples && medianSecondDifference(samples);
}

/** Middle of what all stacks that overlap the first have in common with it; the first one's own middle else. */
export function sharedMiddleMm(stacks: readonly Stack[]): number | undefined {
  const [first, ...others] = stacks;
  if (first === undefined) return undefined;
  const own = commonRange(first, first) ?? { fromMm: 0, toMm: 0 };
  let { fromMm, toMm } = own;
  for (const other of others) {
    const common = commonRange(first, other);
    if (common === undefined || common.fromMm > toMm || common.toMm < fromMm) continue;
    fromMm = Math.max(fromMm, common.fromMm);
    toMm = Math.min(toMm, common.toMm);
  }
  return (fromMm + toMm) / 2;
}

function medianSecondDifference(samples: Float64Array): number {
  const sizes: number[] = [];
  for (let row = 1; row < SIZE - 1; row += 1) {
    for (let column = 1; column < SIZE - 1; column += 1) {
      const at = (down: number, right: number): number =>
        samples[(row + down) * SIZE + column + right] ?? 0;
      const corners = at(-1, -1) + at(-1, 1) + at(1, -1) + at(1, 1);
      const sides = at(-1, 0) + at(1, 0) + at(0, -1) + at(0, 1);
      sizes.push(Math.abs(corners - 2 * sides + 4 * at(0, 0)));
    }
  }
  sizes.sort((a, b) => a - b);
  return sizes[sizes.length >> 1] ?? 0;
}
