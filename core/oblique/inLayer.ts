import { imageHu, type Layer } from './layers.js';

/** A neighbour of less weight than this is not asked: a place on a pixel is that pixel, and what headers round is no reason to ask the next. */
export const NO_WEIGHT = 1e-6;

/** A place between two pixels so near to one of them that it is that pixel. */
export function snapped(part: number): number {
  return part < NO_WEIGHT ? 0 : part > 1 - NO_WEIGHT ? 1 : part;
}

/**
 * HU of one slice at a place of its pixels, bilinear, with each value looked at. NaN outside, where the slice can't be had,
 * and where a pixel that counts is no image.
 */
export function linearInLayer(
  layer: Layer,
  columns: number,
  rows: number,
  column: number,
  row: number,
): number {
  const { stored } = layer;
  if (stored === undefined || !isInside(column, columns) || !isInside(row, rows)) return Number.NaN;
  const left = Math.min(columns - 2, Math.max(0, Math.floor(column)));
  const top = Math.min(rows - 2, Math.max(0, Math.floor(row)));
  const right = snapped(column - left);
  const below = snapped(row - top);
  const place = top * columns + left;
  let sum = 0;
  if (right < 1 && below < 1)
    sum += (1 - right) * (1 - below) * imageHu(stored[place] as number, layer);
  if (right > 0 && below < 1)
    sum += right * (1 - below) * imageHu(stored[place + 1] as number, layer);
  if (right < 1 && below > 0)
    sum += (1 - right) * below * imageHu(stored[place + columns] as number, layer);
  if (right > 0 && below > 0)
    sum += right * below * imageHu(stored[place + columns + 1] as number, layer);
  return sum;
}

/** Whether a place lies on the pixels of a side, by their centres. */
export function isInside(place: number, count: number): boolean {
  return place >= -NO_WEIGHT && place <= count - 1 + NO_WEIGHT;
}

/** HU between two slices, each at a place of its own pixels; one that has no weight is not asked. */
export function mixed(
  low: Layer,
  high: Layer,
  columns: number,
  rows: number,
  xLow: number,
  yLow: number,
  xHigh: number,
  yHigh: number,
  part: number,
): number {
  const t = snapped(part);
  if (t === 0) return linearInLayer(low, columns, rows, xLow, yLow);
  if (t === 1) return linearInLayer(high, columns, rows, xHigh, yHigh);
  const a = linearInLayer(low, columns, rows, xLow, yLow);
  return a + (linearInLayer(high, columns, rows, xHigh, yHigh) - a) * t;
}
