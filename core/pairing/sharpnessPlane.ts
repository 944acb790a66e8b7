import type { PixelEncoding, StoredValues } from '../dicom/index.js';
import { alongNormal, dot, type SliceGrid, type Vec3 } from '../geometry/index.js';
import { isPadding } from '../intensity/index.js';
import type { StackSlice } from '../stack/index.js';

/** Directions that two parallel stacks share: x along rows, y along columns, z along the normal. */
export interface Axes {
  readonly x: Vec3;
  readonly y: Vec3;
  readonly z: Vec3;
}

/** One slice that was read, laid out in axes that both stacks share. */
export interface Plane {
  readonly stored: StoredValues;
  readonly pixels: PixelEncoding;
  readonly columns: number;
  readonly rows: number;
  /** Centre of the first pixel, mm along the axes. */
  readonly originMm: readonly [number, number];
  /** Between columns, between rows. */
  readonly spacingMm: readonly [number, number];
  readonly alongMm: number;
}

/** A slice's pixels as a plane; undefined when the values don't fill its grid. */
export function planeOf(
  { image }: StackSlice,
  stored: StoredValues,
  axes: Axes,
): Plane | undefined {
  const { grid, pixels } = image;
  if (stored.length !== grid.rows * grid.columns) return undefined;
  return {
    stored,
    pixels,
    columns: grid.columns,
    rows: grid.rows,
    originMm: [dot(grid.positionMm, axes.x), dot(grid.positionMm, axes.y)],
    spacingMm: [grid.pixelSpacingMm[1], grid.pixelSpacingMm[0]],
    alongMm: dot(grid.positionMm, axes.z),
  };
}

export function axesOf(grid: SliceGrid): Axes {
  const { rowDirection: x, columnDirection: y } = grid;
  // The normal of the grid, as the one coordinate of it along each axis.
  const along = (point: Vec3): number => alongNormal(grid, point);
  return { x, y, z: [along([1, 0, 0]), along([0, 1, 0]), along([0, 0, 1])] };
}

/** A place of the shared axes in patient space. */
export function toPatient(axes: Axes, xMm: number, yMm: number, zMm: number): Vec3 {
  const part = (k: 0 | 1 | 2): number => axes.x[k] * xMm + axes.y[k] * yMm + axes.z[k] * zMm;
  return [part(0), part(1), part(2)];
}

/** HU of a rectangle of pixels, row after row; undefined where it leaves the image or holds padding. */
export function huRectangle(
  plane: Plane,
  firstColumn: number,
  firstRow: number,
  columns: number,
  rows: number,
): Float64Array | undefined {
  if (firstColumn < 0 || firstRow < 0) return undefined;
  if (firstColumn + columns > plane.columns || firstRow + rows > plane.rows) return undefined;
  const { slope, intercept } = plane.pixels.rescale ?? { slope: 1, intercept: 0 };
  const hu = new Float64Array(columns * rows);
  for (let row = 0; row < rows; row += 1) {
    for (let column = 0; column < columns; column += 1) {
      const stored = plane.stored[(firstRow + row) * plane.columns + firstColumn + column] ?? 0;
      if (isPadding(stored, plane.pixels)) return undefined;
      hu[row * columns + column] = stored * slope + intercept;
    }
  }
  return hu;
}
