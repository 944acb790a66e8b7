import { createCubicLayer, type ReadLayer } from './cubicInLayer.js';
import { unevenWeights } from './cubicWeights.js';
import type { CutPlane, Walk } from './cutPlane.js';
import { isInside, NO_WEIGHT, snapped } from './inLayer.js';
import { onSlice } from './lacking.js';
import type { PlaneInStack } from './layers.js';
import { walkPlane } from './walkPlane.js';

/**
 * Cuts by cubic convolution in the pixels (Keys 1981, doi 10.1109/TASSP.1981.1163711) and by its like for uneven distances
 * across the slices ({@link unevenWeights}), over four by four pixels of up to four slices. It keeps fine detail that
 * linear interpolation smooths, and it can overshoot at an edge. A place has a value only where all that count of them are
 * image: there is none next to the border, to padding and to a slice that can't be had. Beyond an end or a gap of the
 * stack nothing is asked for.
 */
export function cutCubic(
  place: PlaneInStack,
  planeColumns: number,
  planeRows: number,
  cut: CutPlane,
): void {
  const weights = new Float64Array(4);
  const read = createCubicLayer(place.columns, place.rows);
  walkPlane(place, planeColumns, planeRows, (walk, below) =>
    cubicRun(place, walk, below, cut, weights, read),
  );
}

function cubicRun(
  place: PlaneInStack,
  walk: Walk,
  below: number,
  cut: CutPlane,
  weights: Float64Array,
  read: ReadLayer,
): void {
  const { layers } = place;
  const endMm = layers[below + 1]?.alongMm ?? Infinity;
  const [beforeMm, betweenMm, afterMm] = [below - 1, below, below + 1].map((index) =>
    distanceToNext(place, index),
  ) as [number, number, number];
  for (; walk.walked < walk.columns; walk.walked++, walk.at += walk.step) {
    const along = walk.along + walk.walked * walk.alongStep;
    if (along >= endMm) break;
    const x = walk.column + walk.walked * walk.columnStep;
    const y = walk.row + walk.walked * walk.rowStep;
    let first = below - 1;
    let value = Number.NaN;
    if (betweenMm > 0) {
      const part = snapped((along - (layers[below]?.alongMm ?? along)) / betweenMm);
      unevenWeights(part, beforeMm, betweenMm, afterMm, weights);
      value = weighted(place, first, weights, x, y, read);
    }
    const own = Number.isNaN(value) ? onSlice(layers, below, along) : undefined;
    if (own !== undefined) {
      // On a slice within the rounding of positions its neighbours need not be there.
      first = own;
      weights.fill(0);
      weights[0] = 1;
      value = weighted(place, first, weights, x, y, read);
    }
    if (!Number.isNaN(value)) {
      cut.hu[walk.at] = value;
      for (let one = 0; one < 4; one++) if (counts(weights, one)) cut.used[first + one] = 1;
    } else if (betweenMm > 0 || own !== undefined) {
      noteMissing(place, first, weights, x, y, cut.lacking);
    }
  }
}

/** From a slice to the next, mm; 0 where none follows it without a gap. */
function distanceToNext({ layers, isNext }: PlaneInStack, index: number): number {
  const [own, next] = [layers[index], layers[index + 1]];
  return own !== undefined && next !== undefined && isNext[index] === true
    ? next.alongMm - own.alongMm
    : 0;
}

function weighted(
  { layers }: PlaneInStack,
  first: number,
  weights: Float64Array,
  x: number,
  y: number,
  read: ReadLayer,
): number {
  let sum = 0;
  for (let one = 0; one < 4; one++) {
    const layer = layers[first + one];
    if (counts(weights, one))
      sum += layer === undefined ? Number.NaN : (weights[one] as number) * read(layer, x, y);
  }
  return sum;
}

function noteMissing(
  { layers, columns, rows }: PlaneInStack,
  first: number,
  weights: Float64Array,
  x: number,
  y: number,
  lacking: Uint8Array,
): void {
  for (let one = 0; one < 4; one++) {
    const layer = layers[first + one];
    if (layer === undefined || layer.stored !== undefined || !counts(weights, one)) continue;
    if (isInside(x + layer.column, columns) && isInside(y + layer.row, rows))
      lacking[first + one] = 1;
  }
}

function counts(weights: Float64Array, index: number): boolean {
  return Math.abs(weights[index] as number) > NO_WEIGHT;
}
