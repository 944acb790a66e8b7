import type { StoredValues } from '../dicom/index.js';
import type { SliceGrid } from '../geometry/index.js';
import { isPadding, LOWEST_IMAGE_HU, rescaled } from '../intensity/index.js';
import type { StackSlice } from '../stack/index.js';

/** A rectangle of a slice's pixels, smoothed, HU row after row. */
export interface EdgeWindow {
  readonly column: number;
  readonly row: number;
  readonly columns: number;
  readonly rows: number;
  readonly hu: Float64Array;
}

/** Bounds of a rectangle in pixel indices, ends included. */
export interface PixelBounds {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}

/** What is looked for in a window: nothing is smoothed where no pixel lies beyond these. */
export interface Sought {
  readonly aboveHu: number;
  readonly belowHu: number;
}

/**
 * Cuts a rectangle out of a slice and smooths it with a Gaussian, `smoothingMm` its standard deviation along rows and
 * columns alike, whatever the pixels' sides are. Padding, and what is no image, counts as `fillHu`: it is no edge. At
 * the border of the rectangle the last pixel goes on.
 *
 * @returns undefined where no pixel lies beyond what is sought: smoothing makes none that does
 */
export function edgeWindow(
  { image: { grid, pixels } }: StackSlice,
  stored: StoredValues,
  { left, right, top, bottom }: PixelBounds,
  smoothingMm: number,
  fillHu: number,
  sought: Sought,
): EdgeWindow | undefined {
  const columns = Math.max(0, right - left + 1);
  const rows = Math.max(0, bottom - top + 1);
  const raw = new Float64Array(columns * rows);
  const { padding } = pixels;
  const line = pixels.modalityLut === undefined ? pixels.rescale : undefined;
  let [least, most] = [Infinity, -Infinity];
  for (let row = 0, at = 0; row < rows; row++) {
    const start = (top + row) * grid.columns + left;
    for (let column = 0; column < columns; column++, at++) {
      const value = stored[start + column] as number;
      let hu = line === undefined ? rescaled(value, pixels) : value * line.slope + line.intercept;
      if (hu < LOWEST_IMAGE_HU || (padding !== undefined && isPadding(value, pixels))) hu = fillHu;
      if (hu < least) least = hu;
      if (hu > most) most = hu;
      raw[at] = hu;
    }
  }
  if (most <= sought.aboveHu && least >= sought.belowHu) return undefined;
  const hu = smoothed(raw, columns, rows, smoothingMm, grid);
  return { column: left, row: top, columns, rows, hu };
}

function smoothed(
  raw: Float64Array,
  columns: number,
  rows: number,
  smoothingMm: number,
  { pixelSpacingMm }: SliceGrid,
): Float64Array {
  const along = new Float64Array(raw.length);
  const across = gaussianTaps(smoothingMm / pixelSpacingMm[1]);
  for (let row = 0; row < rows; row++) smoothRow(raw, along, row * columns, columns, across);
  const both = new Float64Array(raw.length);
  const down = gaussianTaps(smoothingMm / pixelSpacingMm[0]);
  for (let row = 0; row < rows; row++) addRows(along, both, row, columns, rows, down);
  return both;
}

/** One half of the taps of a Gaussian, the middle one first; they sum to 1 with the other half. */
export function gaussianTaps(sigmaPixels: number): Float64Array {
  const reach = Math.ceil(2 * sigmaPixels);
  const taps = Float64Array.from({ length: reach + 1 }, (_, n) =>
    n === 0 ? 1 : Math.exp(-(n * n) / (2 * sigmaPixels * sigmaPixels)),
  );
  const sum = taps.reduce((total, tap, n) => total + (n === 0 ? tap : 2 * tap), 0);
  return taps.map((tap) => tap / sum);
}

function smoothRow(
  from: Float64Array,
  to: Float64Array,
  start: number,
  columns: number,
  taps: Float64Array,
): void {
  const last = start + columns - 1;
  for (let at = start; at <= last; at++) {
    let sum = (taps[0] as number) * (from[at] as number);
    for (let n = 1; n < taps.length; n++) {
      const before = Math.max(at - n, start);
      const after = Math.min(at + n, last);
      sum += (taps[n] as number) * ((from[before] as number) + (from[after] as number));
    }
    to[at] = sum;
  }
}

/** One row of the result, from whole rows around it: memory is walked in order. */
function addRows(
  from: Float64Array,
  to: Float64Array,
  row: number,
  columns: number,
  rows: number,
  taps: Float64Array,
): void {
  const start = row * columns;
  const middle = taps[0] as number;
  for (let column = 0; column < columns; column++)
    to[start + column] = middle * (from[start + column] as number);
  for (let n = 1; n < taps.length; n++) {
    const tap = taps[n] as number;
    const before = Math.max(0, row - n) * columns;
    const after = Math.min(rows - 1, row + n) * columns;
    for (let column = 0; column < columns; column++)
      to[start + column] =
        (to[start + column] as number) +
        tap * ((from[before + column] as number) + (from[after + column] as number));
  }
}
