import type { StoredValues } from '../dicom/index.js';
import { add, type SliceGrid, scale } from '../geometry/index.js';
import { isPadding, rescaled } from '../intensity/index.js';
import type { StackSlice } from '../stack/index.js';
import { moveShape } from './change.js';
import { offsetOutline } from './offsetOutline.js';
import { visitRuns } from './pixelsInside.js';
import type { Shape } from './shape.js';

/** How far the edge is moved outwards and inwards, mm. */
export const SIZE_CHANGE_MM = 0.25;

/**
 * Placement sensitivity: how far the mean moves, at most, when the shape is placed a little otherwise: moved by half
 * a pixel in eight directions, or its edge moved by 0.25 mm outwards and inwards (both half axes of an ellipse, each
 * side of an outline along its normal). HU. It is a spread by the reader's hand and no standard error; it is large
 * where an edge is near.
 *
 * @param mean of the shape where it lies
 * @returns undefined where one of these ten shapes holds no pixel
 */
export function placementSensitivity(
  shape: Shape,
  slice: StackSlice,
  stored: StoredValues,
  mean: number,
): number | undefined {
  let farthest = 0;
  for (const other of otherPlacements(shape, slice.image.grid)) {
    const moved = other && meanInside(other, slice, stored);
    if (moved === undefined) return undefined;
    farthest = Math.max(farthest, Math.abs(moved - mean));
  }
  return farthest;
}

function otherPlacements(shape: Shape, grid: SliceGrid): readonly (Shape | undefined)[] {
  return [
    ...halfPixelMoves(grid).map((move) => moveShape(shape, move)),
    resized(shape, SIZE_CHANGE_MM),
    resized(shape, -SIZE_CHANGE_MM),
  ];
}

function resized(shape: Shape, byMm: number): Shape | undefined {
  if (shape.kind === 'outline') return offsetOutline(shape, byMm);
  const [a, b] = [shape.radiiMm[0] + byMm, shape.radiiMm[1] + byMm];
  return a > 0 && b > 0 ? { ...shape, radiiMm: [a, b] } : undefined;
}

/**
 * Mean alone: stored values are whole numbers, so their sum is exact, and the rescale comes once at the end. A table
 * in the place of slope and intercept is no straight line: there each value is looked up.
 */
function meanInside(
  shape: Shape,
  { image: { grid, pixels } }: StackSlice,
  stored: StoredValues,
): number | undefined {
  const isPlain = pixels.padding === undefined && pixels.modalityLut === undefined;
  const isLine = pixels.modalityLut === undefined;
  let sum = 0;
  let n = 0;
  visitRuns(shape, grid, (from, end) => {
    if (isPlain) {
      sum += runSum(stored, from, end);
      n += end - from;
      return;
    }
    for (let index = from; index < end; index++) {
      const value = stored[index] as number;
      if (isPadding(value, pixels)) continue;
      sum += isLine ? value : rescaled(value, pixels);
      n++;
    }
  });
  if (n === 0) return undefined;
  return isLine ? rescaled(sum / n, pixels) : sum / n;
}

function runSum(stored: StoredValues, from: number, end: number): number {
  let sum = 0;
  for (let index = from; index < end; index++) sum += stored[index] as number;
  return sum;
}

function halfPixelMoves({ rowDirection, columnDirection, pixelSpacingMm }: SliceGrid) {
  return Array.from({ length: 8 }, (_, eighth) => {
    const angle = (eighth * Math.PI) / 4;
    return add(
      scale(rowDirection, 0.5 * pixelSpacingMm[1] * Math.cos(angle)),
      scale(columnDirection, 0.5 * pixelSpacingMm[0] * Math.sin(angle)),
    );
  });
}
