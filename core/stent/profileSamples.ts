import type { StoredValues } from '../dicom/index.js';
import {
  cross,
  gridNormal,
  normalise,
  patientToPixel,
  subtract,
  type Vec3,
} from '../geometry/index.js';
import { isPadding, LOWEST_IMAGE_HU, rescaled } from '../intensity/index.js';
import { type Result, refuse, success } from '../result.js';
import type { StackSlice } from '../stack/index.js';
import { cubicWeights } from './cubic.js';

/** A straight line across a vessel, patient space, with the width that is averaged over, mm. */
export interface ProfileLine {
  readonly fromMm: Vec3;
  readonly toMm: Vec3;
  readonly bandMm: number;
  /** Inner diameter that the stent was made for, or one that was typed. */
  readonly nominalMm?: number | undefined;
}

/** HU along a line: distance from its start, and the mean over the band. */
export interface ProfileSamples {
  readonly atMm: readonly number[];
  readonly hu: readonly number[];
}

/** Samples to a pixel along the line and across the band. */
const STEPS_PER_PIXEL = 4;
/** The longest line and the widest band, in steps: a vessel is 3 mm wide, a slip of the hand is 500. */
const MOST_STEPS = 4000;

/**
 * HU along a line on one slice, in steps of a quarter of the pixel, averaged over the band in steps as fine, by cubic
 * interpolation. The line is projected along the normal of the slice.
 *
 * @returns refused where a sample would need a pixel beyond the border or of padding
 */
export function profileSamples(
  { fromMm, toMm, bandMm }: ProfileLine,
  { image: { grid, pixels } }: StackSlice,
  stored: StoredValues,
): Result<ProfileSamples> {
  const given = subtract(toMm, fromMm);
  const aside = normalise(cross(gridNormal(grid), given));
  if (aside === undefined) return refuse('no-length', 'The line has no length: draw it again.');
  const along = cross(aside, gridNormal(grid));
  const lengthMm = along[0] * given[0] + along[1] * given[1] + along[2] * given[2];
  const stepMm = Math.min(...grid.pixelSpacingMm) / STEPS_PER_PIXEL;
  const steps = Math.floor(lengthMm / stepMm + 1e-9);
  const beside = Math.max(0, Math.floor(bandMm / 2 / stepMm + 1e-9));
  if (steps > MOST_STEPS || beside > MOST_STEPS)
    return refuse('too-long', 'The line is far longer than a vessel is wide: draw it across one.');
  const place = (t: number, s: number): Vec3 => [
    fromMm[0] + t * along[0] + s * aside[0],
    fromMm[1] + t * along[1] + s * aside[1],
    fromMm[2] + t * along[2] + s * aside[2],
  ];
  const atMm: number[] = [];
  const hu: number[] = [];
  for (let step = 0; step <= steps; step += 1) {
    let sum = 0;
    for (let side = -beside; side <= beside; side += 1) {
      const { column, row } = patientToPixel(grid, place(step * stepMm, side * stepMm));
      const value = interpolated(stored, grid.columns, grid.rows, column, row, (one) => {
        const rescaledHu = rescaled(one, pixels);
        return isPadding(one, pixels) || rescaledHu < LOWEST_IMAGE_HU ? Number.NaN : rescaledHu;
      });
      if (value === undefined)
        return refuse(
          'over-border',
          'The line reaches over the border of the image: move it inside.',
        );
      if (Number.isNaN(value))
        return refuse('padding-inside', 'Padding lies in the band: move the line into the image.');
      sum += value;
    }
    atMm.push(step * stepMm);
    hu.push(sum / (2 * beside + 1));
  }
  return success({ atMm, hu });
}

/** Cubic in rows and columns; undefined where one of the sixteen pixels is not there, NaN where one is padding. */
function interpolated(
  stored: StoredValues,
  columns: number,
  rows: number,
  column: number,
  row: number,
  huOf: (stored: number) => number,
): number | undefined {
  const left = Math.floor(column);
  const top = Math.floor(row);
  if (left < 1 || top < 1 || left + 2 >= columns || top + 2 >= rows) return undefined;
  const across = cubicWeights(column - left);
  const down = cubicWeights(row - top);
  let sum = 0;
  down.forEach((weight, y) => {
    const start = (top + y - 1) * columns + left - 1;
    across.forEach((share, x) => {
      sum += weight * share * huOf(stored[start + x] as number);
    });
  });
  return sum;
}
