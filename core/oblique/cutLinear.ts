import type { StoredValues } from '../dicom/index.js';
import type { CutPlane, Walk } from './cutPlane.js';
import { linearInLayer, mixed, NO_WEIGHT } from './inLayer.js';
import { noteLacking, onSlice } from './lacking.js';
import type { Layer, PlaneInStack } from './layers.js';
import { walkPlane } from './walkPlane.js';

/**
 * Cuts by linear interpolation: bilinear in the two slices to both sides, each on its own pixels along the normal, mixed
 * by their true distances. In an upright stack of even spacing that is trilinear interpolation.
 */
export function cutLinear(
  place: PlaneInStack,
  planeColumns: number,
  planeRows: number,
  cut: CutPlane,
): void {
  walkPlane(place, planeColumns, planeRows, (walk, below) => {
    const low = place.layers[below];
    const high = place.layers[below + 1];
    const isBetween = low !== undefined && high !== undefined && place.isNext[below] === true;
    if (!isBetween || low.stored === undefined || high.stored === undefined) {
      aloneRun(place, walk, below, cut);
    } else if (low.column === high.column && low.row === high.row) {
      plainRun(place, walk, below, low, high, low.stored, high.stored, cut);
    } else {
      shiftedRun(place, walk, below, low, high, cut);
    }
  });
}

/** Between neighbours that lie above one another: the usual case, and the one that must be quick. */
function plainRun(
  { columns, rows }: PlaneInStack,
  walk: Walk,
  below: number,
  low: Layer,
  high: Layer,
  a: StoredValues,
  b: StoredValues,
  { hu, used }: CutPlane,
): void {
  const [lastColumn, lastRow] = [columns - 1 + NO_WEIGHT, rows - 1 + NO_WEIGHT];
  const { alongMm, slope, intercept, surelyFrom } = low;
  const { alongMm: endMm, slope: slopeB, intercept: interceptB, surelyFrom: fromB } = high;
  const perMm = 1 / (endMm - alongMm);
  const { along: along0, alongStep, columnStep, rowStep, step } = walk;
  const [column0, row0] = [low.column + walk.column, low.row + walk.row];
  let { at, walked } = walk;
  let isLowUsed = false;
  let isHighUsed = false;
  for (; walked < walk.columns; walked++, at += step) {
    const along = along0 + walked * alongStep;
    if (along >= endMm) break;
    const x = column0 + walked * columnStep;
    const y = row0 + walked * rowStep;
    if (!(x >= -NO_WEIGHT && y >= -NO_WEIGHT && x <= lastColumn && y <= lastRow)) continue;
    let left = x | 0;
    if (left > columns - 2) left = columns - 2;
    let top = y | 0;
    if (top > rows - 2) top = rows - 2;
    const p = top * columns + left;
    const q = p + columns;
    // The places lie inside the image, so that each holds a number.
    const a0 = a[p] as number;
    const a1 = a[p + 1] as number;
    const a2 = a[q] as number;
    const a3 = a[q + 1] as number;
    const b0 = b[p] as number;
    const b1 = b[p + 1] as number;
    const b2 = b[q] as number;
    const b3 = b[q + 1] as number;
    const t = (along - alongMm) * perMm;
    // The sign of one difference shows in all of them together: one question in place of eight.
    const isImage =
      ((a0 - surelyFrom) |
        (a1 - surelyFrom) |
        (a2 - surelyFrom) |
        (a3 - surelyFrom) |
        (b0 - fromB) |
        (b1 - fromB) |
        (b2 - fromB) |
        (b3 - fromB)) >=
      0;
    if (isImage) {
      const u = x - left;
      const v = y - top;
      const upperA = a0 + (a1 - a0) * u;
      const upperB = b0 + (b1 - b0) * u;
      const valueA = upperA + (a2 + (a3 - a2) * u - upperA) * v;
      const valueB = upperB + (b2 + (b3 - b2) * u - upperB) * v;
      const huA = valueA * slope + intercept;
      hu[at] = huA + (valueB * slopeB + interceptB - huA) * t;
    } else {
      const value = mixed(low, high, columns, rows, x, y, x, y, t);
      if (Number.isNaN(value)) continue;
      hu[at] = value;
    }
    if (t < 1 - NO_WEIGHT) isLowUsed = true;
    if (t > NO_WEIGHT) isHighUsed = true;
  }
  if (isLowUsed) used[below] = 1;
  if (isHighUsed) used[below + 1] = 1;
  walk.at = at;
  walk.walked = walked;
}

/** Between neighbours that are shifted against each other: each on its own pixels. */
function shiftedRun(
  { columns, rows }: PlaneInStack,
  walk: Walk,
  below: number,
  low: Layer,
  high: Layer,
  { hu, used }: CutPlane,
): void {
  for (; walk.walked < walk.columns; walk.walked++, walk.at += walk.step) {
    const along = walk.along + walk.walked * walk.alongStep;
    if (along >= high.alongMm) break;
    const x = walk.column + walk.walked * walk.columnStep;
    const y = walk.row + walk.walked * walk.rowStep;
    const t = (along - low.alongMm) / (high.alongMm - low.alongMm);
    const [xLow, yLow] = [x + low.column, y + low.row];
    const value = mixed(low, high, columns, rows, xLow, yLow, x + high.column, y + high.row, t);
    if (Number.isNaN(value)) continue;
    hu[walk.at] = value;
    if (t < 1 - NO_WEIGHT) used[below] = 1;
    if (t > NO_WEIGHT) used[below + 1] = 1;
  }
}

/** Beyond the ends, in a gap, and beside a slice that can't be had: only what lies on a slice has a value. */
function aloneRun(place: PlaneInStack, walk: Walk, below: number, cut: CutPlane): void {
  const { layers, columns, rows } = place;
  const endMm = layers[below + 1]?.alongMm ?? Infinity;
  for (; walk.walked < walk.columns; walk.walked++, walk.at += walk.step) {
    const along = walk.along + walk.walked * walk.alongStep;
    if (along >= endMm) break;
    const x = walk.column + walk.walked * walk.columnStep;
    const y = walk.row + walk.walked * walk.rowStep;
    const index = onSlice(layers, below, along);
    const layer = index === undefined ? undefined : layers[index];
    if (index === undefined || layer?.stored === undefined) {
      noteLacking(place, below, index, x, y, cut.lacking);
      continue;
    }
    const value = linearInLayer(layer, columns, rows, x + layer.column, y + layer.row);
    if (Number.isNaN(value)) continue;
    cut.hu[walk.at] = value;
    cut.used[index] = 1;
  }
}
