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

/**
 * Cuts a rectangle out of a slice and smooths it with a Gaussian, `smoothingMm` its standard deviation along rows and
 * columns alike, whatever the pixels' sides are. Padding, and what is no image, counts as `fillHu`: it is no edge. At
 * the border of the rectangle the last pixel goes on.
 */
export function edgeWindow(
  { image: { grid, pixels } }: StackSlice,
  stored: StoredValues,
  bounds: PixelBounds,
  smoothingMm: number,
  fillHu: number,
): EdgeWindow {
  const { left, top } = bounds;
  const columns = Math.max(0, bounds.right - left + 1);
  const rows = Math.max(0, bounds.bottom - top + 1);
  const raw = new Float64Array(columns * rows);
  const line = pixels.modalityLut === undefined ? pixels.rescale : undefined;
  for (let row = 0, at = 0; row < rows; row++) {
    const start = (top + row) * grid.columns + left;
    for (let column = 0; column < columns; column++, at++) {
      const value = stored[start + column] as number;
      const hu = line === undefined ? rescaled(value, pixels) : value * line.slope + line.intercept;
      const isImage =
        hu >= LOWEST_IMAGE_HU && (pixels.padding === undefined || !isPadding(value, pixels));
      raw[at] = isImage ? hu : fillHu;
    }
  }
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
  const across = gaussianTaps(smoothingMm / pixelSpacingMm[1]);
  const down = gaussianTaps(smoothingMm / pixelSpacingMm[0]);
  const along = new Float64Array(raw.length);
  for (let row = 0; row < rows; row++) convolve(raw, along, row * columns, 1, columns, across);
  const both = new Float64Array(raw.length);
  for (let row = 0; row < rows; row++) addRows(along, both, row, columns, rows, down);
  return both;
}

/** One half of the taps, the middle one first; they sum to 1 with the other half. */
function gaussianTaps(sigmaPixels: number): Float64Array {
  const reach = Math.ceil(2.5 * sigmaPixels);
  const taps = Float64Array.from({ length: reach + 1 }, (_, n) =>
    n === 0 ? 1 : Math.exp(-(n * n) / (2 * sigmaPixels * sigmaPixels)),
  );
  const sum = taps.reduce((total, tap, n) => total + (n === 0 ? tap : 2 * tap), 0);
  return taps.map((tap) => tap / sum);
}

function convolve(
  from: Float64Array,
  to: Float64Array,
  start: number,
  step: number,
  count: number,
  taps: Float64Array,
): void {
  const reach = taps.length - 1;
  for (let at = 0; at < count; at++) {
    let sum = (taps[0] as number) * (from[start + at * step] as number);
    for (let n = 1; n <= reach; n++) {
      const before = from[start + Math.max(0, at - n) * step] as number;
      const after = from[start + Math.min(count - 1, at + n) * step] as number;
      sum += (taps[n] as number) * (before + after);
    }
    to[start + at * step] = sum;
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
  for (let n = 0; n < taps.length; n++) {
    const tap = taps[n] as number;
    const before = Math.max(0, row - n) * columns;
    const after = Math.min(rows - 1, row + n) * columns;
    for (let column = 0; column < columns; column++) {
      const values =
        n === 0
          ? (from[start + column] as number)
          : (from[before + column] as number) + (from[after + column] as number);
      to[start + column] = (to[start + column] as number) + tap * values;
    }
  }
}
