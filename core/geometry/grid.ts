import { add, cross, dot, scale, subtract, type Vec3 } from './vec3.js';

/** The pixel grid of one slice in patient space (PS3.3 C.7.6.2.1.1). */
export interface SliceGrid {
  /** Image Position (Patient): centre of the first pixel, LPS, mm. */
  readonly positionMm: Vec3;
  /** Direction of a row: the way the column index grows. Unit length. */
  readonly rowDirection: Vec3;
  /** Direction of a column: the way the row index grows. Unit length. */
  readonly columnDirection: Vec3;
  /** [between rows, between columns], mm: the order of Pixel Spacing (0028,0030). */
  readonly pixelSpacingMm: readonly [number, number];
  readonly rows: number;
  readonly columns: number;
  /**
   * Set where the file has no pixel spacing. `pixelSpacingMm` is then [1, 1], which lays the pixels out on the screen and
   * is no length: nothing in the plane of the slice may be measured, compared or told in mm (AWKWARD row 88). The
   * position and the directions are the file's.
   */
  readonly unscaled?: true;
}

/** A place in a slice's pixel indices: 0 is the centre of the first column or row. Fractions are places between. */
export interface PixelPoint {
  readonly column: number;
  readonly row: number;
}

/** Unit normal of a slice: row direction × column direction. */
export function gridNormal(grid: SliceGrid): Vec3 {
  return cross(grid.rowDirection, grid.columnDirection);
}

/** Equation C.7.6.2.1-1: P = S + X·Δi·i + Y·Δj·j. */
export function pixelToPatient(grid: SliceGrid, { column, row }: PixelPoint): Vec3 {
  const along = scale(grid.rowDirection, grid.pixelSpacingMm[1] * column);
  const down = scale(grid.columnDirection, grid.pixelSpacingMm[0] * row);
  return add(grid.positionMm, add(along, down));
}

/** The inverse of {@link pixelToPatient} for points in the slice; other points are projected along the normal. */
export function patientToPixel(grid: SliceGrid, point: Vec3): PixelPoint {
  const offset = subtract(point, grid.positionMm);
  return {
    column: dot(offset, grid.rowDirection) / grid.pixelSpacingMm[1],
    row: dot(offset, grid.columnDirection) / grid.pixelSpacingMm[0],
  };
}

/** Position of a point along the slice normal, mm. Differences of it are distances between slices. */
export function alongNormal(grid: SliceGrid, point: Vec3): number {
  return dot(point, gridNormal(grid));
}
