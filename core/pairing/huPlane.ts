import type { StoredValues } from '../dicom/index.js';
import type { SliceGrid, Vec3 } from '../geometry/index.js';
import { patientToPixel } from '../geometry/index.js';
import { isPadding } from '../intensity/index.js';
import type { StackSlice } from '../stack/index.js';

/** A slice with its rescaled values, row after row; NaN where there is padding. */
export interface HuPlane {
  readonly grid: SliceGrid;
  readonly values: Float32Array;
  readonly alongMm: number;
}

/** The values of a slice, rescaled: HU where the file gives HU, the file's own unit else. */
export function huPlane({ image, alongMm }: StackSlice, stored: StoredValues): HuPlane {
  const { padding, rescale } = image.pixels;
  const { slope, intercept } = rescale ?? { slope: 1, intercept: 0 };
  const values = new Float32Array(stored.length);
  for (let index = 0; index < stored.length; index += 1) {
    values[index] = (stored[index] as number) * slope + intercept;
  }
  if (padding !== undefined) {
    stored.forEach((value, index) => {
      if (isPadding(value, image.pixels)) values[index] = Number.NaN;
    });
  }
  return { grid: image.grid, values, alongMm };
}

/** A square of sampling places in a slice, in patient space. */
export interface SampleGrid {
  /** Place of the first sample; only its place in the plane counts, samples are taken in the slice that is read. */
  readonly cornerMm: Vec3;
  readonly rowDirection: Vec3;
  readonly columnDirection: Vec3;
  readonly stepMm: number;
  readonly size: number;
}

/**
 * Samples a slice on a square by bilinear interpolation, row after row.
 *
 * @returns undefined when a place lies outside the image or next to padding: what is not there is not made up
 */
export function samplePlane(plane: HuPlane, square: SampleGrid): Float64Array | undefined {
  const { grid, values } = plane;
  const { size, cornerMm, rowDirection, columnDirection, stepMm } = square;
  const at = (column: number, row: number) =>
    patientToPixel(grid, [
      cornerMm[0] + stepMm * (column * rowDirection[0] + row * columnDirection[0]),
      cornerMm[1] + stepMm * (column * rowDirection[1] + row * columnDirection[1]),
      cornerMm[2] + stepMm * (column * rowDirection[2] + row * columnDirection[2]),
    ]);
  const origin = at(0, 0);
  const right = at(1, 0);
  const down = at(0, 1);
  const samples = new Float64Array(size * size);
  for (let row = 0; row < size; row += 1) {
    let x = origin.column + row * (down.column - origin.column);
    let y = origin.row + row * (down.row - origin.row);
    for (let column = 0; column < size; column += 1) {
      const value = bilinear(values, grid.columns, grid.rows, x, y);
      if (!Number.isFinite(value)) return undefined;
      samples[row * size + column] = value;
      x += right.column - origin.column;
      y += right.row - origin.row;
    }
  }
  return samples;
}

/** NaN outside the image and next to padding. A place on a pixel reads that pixel alone. */
function bilinear(
  values: Float32Array,
  columns: number,
  rows: number,
  x: number,
  y: number,
): number {
  const left = Math.floor(x);
  const top = Math.floor(y);
  if (left < 0 || top < 0 || left >= columns - 1 || top >= rows - 1) return Number.NaN;
  const right = x - left;
  const below = y - top;
  const index = top * columns + left;
  // The corners lie inside the image, so each index holds a number.
  const upper = (values[index] as number) * (1 - right) + (values[index + 1] as number) * right;
  const lower =
    (values[index + columns] as number) * (1 - right) +
    (values[index + columns + 1] as number) * right;
  return upper * (1 - below) + lower * below;
}
