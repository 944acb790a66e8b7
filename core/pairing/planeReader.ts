import type { Stack } from '../stack/index.js';
import type { ReadSlice } from './contract.js';
import { type HuPlane, huPlane } from './huPlane.js';

/** A slice nearer to a position than this part of the spacing stands for it; else two are mixed. */
const NEAR_ENOUGH = 0.1;
/** Positions are rounded in files, mm. */
const ROUNDING_MM = 1e-3;

/** The slice of a stack nearest to a position along its normal. */
export function nearestSlice(
  { slices }: Stack,
  alongMm: number,
): { index: number; offsetMm: number } {
  let index = 0;
  let offsetMm = Infinity;
  slices.forEach((slice, place) => {
    const offset = slice.alongMm - alongMm;
    if (Math.abs(offset) < Math.abs(offsetMm)) {
      index = place;
      offsetMm = offset;
    }
  });
  return { index, offsetMm };
}

/** A slice with its values; undefined when it can't be had. */
export async function readPlane(
  stack: Stack,
  index: number,
  read: ReadSlice,
): Promise<HuPlane | undefined> {
  const slice = stack.slices[index];
  if (slice === undefined) return undefined;
  const stored = await read(stack, index);
  return stored === undefined ? undefined : huPlane(slice, stored);
}

/**
 * The values of a stack at a position: those of the slice there, or of two neighbours mixed by their distance when none
 * is near enough. Where the two lie beside each other (a sheared stack), or one is missing, the nearer one is taken if it
 * lies within half the spacing.
 */
export async function planeAt(
  stack: Stack,
  alongMm: number,
  read: ReadSlice,
): Promise<HuPlane | undefined> {
  const { index, offsetMm } = nearestSlice(stack, alongMm);
  const spacingMm = stack.sliceSpacingMm ?? 0;
  const near = Math.abs(offsetMm);
  if (near > spacingMm / 2 + ROUNDING_MM) return undefined;
  const plane = await readPlane(stack, index, read);
  if (plane === undefined || near <= NEAR_ENOUGH * spacingMm) return plane;
  const other = await readPlane(stack, offsetMm > 0 ? index - 1 : index + 1, read);
  if (other === undefined || !sameFrame(plane, other)) return plane;
  const gapMm = Math.abs(other.alongMm - plane.alongMm);
  if (gapMm > 1.5 * spacingMm || gapMm < near) return plane;
  const part = near / gapMm;
  const values = plane.values.map(
    (value, place) => value * (1 - part) + (other.values[place] ?? Number.NaN) * part,
  );
  return { ...plane, values, alongMm };
}

/** Whether pixels of two slices lie above one another. */
function sameFrame({ grid: a }: HuPlane, { grid: b }: HuPlane): boolean {
  const across = [a.rowDirection, a.columnDirection].map((direction) =>
    direction.reduce(
      (sum, part, axis) => sum + part * ((b.positionMm[axis] ?? 0) - (a.positionMm[axis] ?? 0)),
      0,
    ),
  );
  return across.every((shift) => Math.abs(shift) < ROUNDING_MM);
}
