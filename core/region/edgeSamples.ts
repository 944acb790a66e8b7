import type { StoredValues } from '../dicom/index.js';
import {
  cross,
  distance,
  dot,
  gridNormal,
  normalise,
  patientToPixel,
  type SliceGrid,
  subtract,
  type Vec3,
} from '../geometry/index.js';
import { isPadding, LOWEST_IMAGE_HU, rescaled } from '../intensity/index.js';
import type { EdgeSamples } from '../quality/index.js';
import { type Result, refuse, success } from '../result.js';
import type { StackSlice } from '../stack/index.js';

/** A straight line in patient space with the width of the band around it, mm. */
export interface BandLine {
  readonly fromMm: Vec3;
  readonly toMm: Vec3;
  readonly bandMm: number;
}

/** Bands are kept within these widths, mm: one pixel row is no band, and wide ones leave the edge's curve. */
export const BAND_MM = { least: 1, most: 12, usual: 4 } as const;

/** A line may lean from the slice by this sine: that of the rule for regions. */
const LEANING = 4.5e-3;
const ROUNDING_MM = 0.01;

/** Whether a line lies in planes parallel to a slice. */
export function checkLineParallel({ fromMm, toMm }: BandLine, grid: SliceGrid): Result<undefined> {
  const along = subtract(toMm, fromMm);
  const out = Math.abs(dot(along, gridNormal(grid)));
  return out <= Math.max(ROUNDING_MM, LEANING * distance(fromMm, toMm))
    ? success(undefined)
    : refuse('not-parallel', 'The line leans against the slices of this stack: not measured.');
}

/**
 * The pixels of a slice whose centres lie in the band of a line: their distances along the line and across it, from
 * its middle, and their HU. Nothing is resampled.
 *
 * @returns refused where the band reaches over the border or over padding: a level there is none of the image
 */
export function edgeSamples(
  line: BandLine,
  { image: { grid, pixels } }: StackSlice,
  stored: StoredValues,
): Result<EdgeSamples> {
  const axes = axesOf(line, grid);
  if (axes === undefined) return refuse('no-length', 'The line has no length: draw it again.');
  const { along, aside, lengthMm, middleMm } = axes;
  const halfMm = line.bandMm / 2;
  const corners = [-1, 1].flatMap((a) =>
    [-1, 1].map((b) => {
      const point = middleMm.map(
        (mm, axis) =>
          mm + (a * lengthMm * (along[axis] ?? 0)) / 2 + b * halfMm * (aside[axis] ?? 0),
      );
      return patientToPixel(grid, [point[0] ?? 0, point[1] ?? 0, point[2] ?? 0]);
    }),
  );
  const columns = corners.map(({ column }) => column);
  const rows = corners.map(({ row }) => row);
  if (
    Math.min(...columns) < -0.5 ||
    Math.min(...rows) < -0.5 ||
    Math.max(...columns) > grid.columns - 0.5 ||
    Math.max(...rows) > grid.rows - 0.5
  )
    return refuse('over-border', 'The line reaches over the border of the image: move it inside.');
  const middle = patientToPixel(grid, middleMm);
  // Plane coordinates, mm from the middle of the line along rows and columns.
  const [alongX, alongY] = [dot(along, grid.rowDirection), dot(along, grid.columnDirection)];
  const across: number[] = [];
  const beside: number[] = [];
  const hu: number[] = [];
  for (let row = Math.ceil(Math.min(...rows)); row <= Math.max(...rows); row += 1) {
    const y = (row - middle.row) * grid.pixelSpacingMm[0];
    for (
      let column = Math.ceil(Math.min(...columns));
      column <= Math.max(...columns);
      column += 1
    ) {
      const x = (column - middle.column) * grid.pixelSpacingMm[1];
      const t = x * alongX + y * alongY;
      const s = y * alongX - x * alongY;
      if (Math.abs(t) > lengthMm / 2 || Math.abs(s) > halfMm) continue;
      const value = stored[row * grid.columns + column] ?? 0;
      const rescaledHu = rescaled(value, pixels);
      if (isPadding(value, pixels) || rescaledHu < LOWEST_IMAGE_HU)
        return refuse('padding-inside', 'Padding lies in the band: move the line into the image.');
      across.push(t);
      beside.push(s);
      hu.push(rescaledHu);
    }
  }
  return success({
    acrossMm: Float64Array.from(across),
    alongMm: Float64Array.from(beside),
    hu: Float64Array.from(hu),
  });
}

/** The line's own axes in the plane of the slice; undefined for one without length. */
function axesOf({ fromMm, toMm }: BandLine, grid: SliceGrid) {
  const given = subtract(toMm, fromMm);
  const [x, y] = [dot(given, grid.rowDirection), dot(given, grid.columnDirection)];
  const along = normalise([
    x * grid.rowDirection[0] + y * grid.columnDirection[0],
    x * grid.rowDirection[1] + y * grid.columnDirection[1],
    x * grid.rowDirection[2] + y * grid.columnDirection[2],
  ]);
  if (along === undefined) return undefined;
  const middleMm: Vec3 = [
    (fromMm[0] + toMm[0]) / 2,
    (fromMm[1] + toMm[1]) / 2,
    (fromMm[2] + toMm[2]) / 2,
  ];
  return {
    along,
    aside: cross(gridNormal(grid), along),
    lengthMm: Math.hypot(x, y),
    middleMm,
  };
}
