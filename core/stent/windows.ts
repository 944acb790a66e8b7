import type { StoredValues } from '../dicom/index.js';
import { cross, dot, patientToPixel, subtract, type Vec3 } from '../geometry/index.js';
import { isPadding, LOWEST_IMAGE_HU, rescaled } from '../intensity/index.js';
import { type Result, refuse, success } from '../result.js';
import type { Stack } from '../stack/index.js';

/** Stored values of a slice of a stack; undefined where it can't be read. */
export type StoredOfStack = (stack: Stack, sliceIndex: number) => StoredValues | undefined;

/** Axes in the plane of the slices, and the point that everything is measured from. */
export interface Frame {
  readonly originMm: Vec3;
  readonly u: Vec3;
  readonly v: Vec3;
  readonly normal: Vec3;
}

/** The pixels of one slice around the start: places in the plane from the start, and HU. */
export interface SliceWindow {
  readonly sliceIndex: number;
  /** From the start along the normal. */
  readonly zMm: number;
  readonly uMm: Float64Array;
  readonly vMm: Float64Array;
  readonly hu: Float64Array;
}

/** The neighbouring slices of one kernel. */
export interface KernelWindow {
  readonly pixelMm: number;
  readonly thicknessMm: number | undefined;
  readonly slices: readonly SliceWindow[];
}

/** Slices are taken this far to both sides of the start, and no more of them than this. */
export const REACH_MM = 1.25;
const MOST_SLICES = 5;
/** Half side of the square that is read. */
const HALF_SIDE_MM = 6.2;

/** Axes of a stack around a point. */
export function frameOf(stack: Stack, originMm: Vec3): Frame {
  const { rowDirection: u, columnDirection: v } = stack.slices[0].image.grid;
  return { originMm, u, v, normal: cross(u, v) };
}

/** Place in patient space of a point in the plane at a height. */
export function inPatient({ originMm, u, v, normal }: Frame, x: number, y: number, z = 0): Vec3 {
  const at = (axis: 0 | 1 | 2): number =>
    originMm[axis] + x * u[axis] + y * v[axis] + z * normal[axis];
  return [at(0), at(1), at(2)];
}

/**
 * Reads the slices of a stack next to a point.
 *
 * @returns refused where the square reaches over the border or over padding, or a slice is missing
 */
export function readWindow(
  stack: Stack,
  frame: Frame,
  storedOf: StoredOfStack,
): Result<KernelWindow> {
  const start = dot(frame.originMm, frame.normal);
  const near = stack.slices
    .map((slice, sliceIndex) => ({
      slice,
      sliceIndex,
      zMm: dot(slice.image.grid.positionMm, frame.normal) - start,
    }))
    .filter(({ zMm }) => Math.abs(zMm) <= REACH_MM)
    .sort((a, b) => Math.abs(a.zMm) - Math.abs(b.zMm))
    .slice(0, MOST_SLICES)
    .sort((a, b) => a.zMm - b.zMm);
  if (near.length === 0)
    return refuse('no-slice', 'No slice lies at the point on one of the stacks: choose another.');
  const slices: SliceWindow[] = [];
  for (const { slice, sliceIndex, zMm } of near) {
    const stored = storedOf(stack, sliceIndex);
    if (stored === undefined)
      return refuse('slice-missing', 'A slice next to the point could not be read.');
    const { grid, pixels } = slice.image;
    const { column, row } = patientToPixel(grid, frame.originMm);
    const wide = HALF_SIDE_MM / grid.pixelSpacingMm[1];
    const high = HALF_SIDE_MM / grid.pixelSpacingMm[0];
    const [left, right] = [Math.ceil(column - wide), Math.floor(column + wide)];
    const [top, bottom] = [Math.ceil(row - high), Math.floor(row + high)];
    if (left < 0 || top < 0 || right >= grid.columns || bottom >= grid.rows)
      return refuse('over-border', 'The point lies too near the border of the image.');
    const count = (right - left + 1) * (bottom - top + 1);
    const [uMm, vMm, hu] = [
      new Float64Array(count),
      new Float64Array(count),
      new Float64Array(count),
    ];
    const corner = subtract(grid.positionMm, frame.originMm);
    let index = 0;
    for (let y = top; y <= bottom; y += 1)
      for (let x = left; x <= right; x += 1) {
        const value = stored[y * grid.columns + x] as number;
        const one = rescaled(value, pixels);
        if (isPadding(value, pixels) || one < LOWEST_IMAGE_HU)
          return refuse('padding-inside', 'Padding lies around the point.');
        const [across, down] = [x * grid.pixelSpacingMm[1], y * grid.pixelSpacingMm[0]];
        uMm[index] =
          dot(corner, frame.u) +
          across * dot(grid.rowDirection, frame.u) +
          down * dot(grid.columnDirection, frame.u);
        vMm[index] =
          dot(corner, frame.v) +
          across * dot(grid.rowDirection, frame.v) +
          down * dot(grid.columnDirection, frame.v);
        hu[index] = one;
        index += 1;
      }
    slices.push({ sliceIndex, zMm, uMm, vMm, hu });
  }
  const { grid, acquisition } = stack.slices[0].image;
  return success({
    pixelMm: Math.max(...grid.pixelSpacingMm),
    thicknessMm: acquisition.thicknessMm,
    slices,
  });
}
