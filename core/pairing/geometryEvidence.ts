import { formatPosition } from '../format/index.js';
import { dot, gridNormal, pixelToPatient, type SliceGrid, subtract } from '../geometry/index.js';
import type { Evidence } from '../note/index.js';
import type { Stack } from '../stack/index.js';
import { tiltDegrees } from '../stack/index.js';
import { areParallel, commonRange, spanOf } from './commonRange.js';
import { compareNumbers, say } from './compareStated.js';

/** 1e-4 in the cosines, the rounding of files, is 0.8° near 0: angles are told from here on, degrees. */
const SAME_ANGLE_DEG = 0.3;
const SAME_TILT_DEG = 0.2;
const SAME_SPACING_MM = 1e-3;
const SAME_THICKNESS_MM = 0.01;
/** Fields of view are rounded in files, mm. */
const SAME_FIELD_MM = 0.05;

/** Orientation, overlap, spacings, thickness, field of view and tilt of two stacks, in that order. */
export function geometryEvidence(first: Stack, second: Stack): readonly Evidence[] {
  const a = first.slices[0].image;
  const b = second.slices[0].image;
  return [
    orientationEvidence(a.grid, b.grid),
    overlapEvidence(first, second),
    compareNumbers(
      'slice spacing',
      first.sliceSpacingMm,
      second.sliceSpacingMm,
      SAME_SPACING_MM,
      'mm',
    ),
    compareNumbers(
      'thickness',
      a.acquisition.thicknessMm,
      b.acquisition.thicknessMm,
      SAME_THICKNESS_MM,
      'mm',
    ),
    pixelSpacingEvidence(a.grid, b.grid),
    fieldEvidence(a.grid, b.grid),
    compareNumbers(
      'tilt',
      tiltDegrees(first.slices),
      tiltDegrees(second.slices),
      SAME_TILT_DEG,
      '°',
    ),
  ];
}

function orientationEvidence(a: SliceGrid, b: SliceGrid): Evidence {
  const check = 'orientation';
  const rows = angleDeg(dot(a.rowDirection, b.rowDirection));
  const normals = angleDeg(dot(gridNormal(a), gridNormal(b)));
  const both = `${directions(a)} and ${directions(b)}`;
  return Math.max(rows, normals) <= SAME_ANGLE_DEG
    ? {
        check,
        state: 'agrees',
        text: `same orientation: rows and columns run along ${directions(a)}`,
      }
    : {
        check,
        state: 'differs',
        text: `another orientation: rows turned by ${rows.toFixed(1)}°, slices leaning by ${normals.toFixed(1)}°; ${both}`,
      };
}

function directions({ rowDirection, columnDirection }: SliceGrid): string {
  const list = (values: readonly number[]): string =>
    values.map((value) => Number(value.toFixed(4))).join(' ');
  return `(${list(rowDirection)}; ${list(columnDirection)})`;
}

function angleDeg(cosine: number): number {
  return (Math.acos(Math.min(1, Math.max(-1, cosine))) * 180) / Math.PI;
}

/** Whether the two share a range along the normal; stacks that lean against each other share none. */
function overlapEvidence(first: Stack, second: Stack): Evidence {
  const check = 'overlap';
  if (!areParallel(first, second)) {
    return { check, state: 'differs', text: 'the slices of the two stacks are not parallel' };
  }
  const common = commonRange(first, second);
  const spans = [spanOf(first), spanOf(second)].map(
    ({ fromMm, toMm }) => `${fromMm.toFixed(1)} to ${toMm.toFixed(1)} mm`,
  );
  const both = `along the normal ${spans.join(' and ')}`;
  return common === undefined
    ? { check, state: 'differs', text: `no slices in common: ${both}` }
    : {
        check,
        state: 'agrees',
        text: `${(common.toMm - common.fromMm).toFixed(1)} mm of slices in common: ${both}`,
      };
}

function pixelSpacingEvidence(a: SliceGrid, b: SliceGrid): Evidence {
  const check = 'pixel spacing';
  if (a.unscaled || b.unscaled) {
    const which = a.unscaled && b.unscaled ? 'the two stacks have' : 'one of the stacks has';
    return { check, state: 'differs', text: `${which} no pixel spacing` };
  }
  const text = ({ pixelSpacingMm }: SliceGrid): string =>
    `${say(pixelSpacingMm[0], '×')} ${say(pixelSpacingMm[1], 'mm')}`;
  const same = a.pixelSpacingMm.every(
    (value, index) => Math.abs(value - (b.pixelSpacingMm[index] ?? Infinity)) <= SAME_SPACING_MM,
  );
  return same
    ? { check, state: 'agrees', text: `same pixel spacing: ${text(a)}` }
    : { check, state: 'differs', text: `another pixel spacing: ${text(a)} and ${text(b)}` };
}

/** Size and centre of the field that the pixels cover; compared in the plane of the slices. */
function fieldEvidence(a: SliceGrid, b: SliceGrid): Evidence {
  const check = 'field of view';
  if (a.unscaled || b.unscaled) {
    return { check, state: 'unknown', text: 'field of view: not known without a pixel spacing' };
  }
  const [x, y] = [fieldOf(a), fieldOf(b)];
  const apart = subtract(x.centreMm, y.centreMm);
  const differences = [
    x.widthMm - y.widthMm,
    x.heightMm - y.heightMm,
    dot(apart, a.rowDirection),
    dot(apart, a.columnDirection),
  ];
  return differences.every((difference) => Math.abs(difference) <= SAME_FIELD_MM)
    ? { check, state: 'agrees', text: `same field of view: ${x.text}` }
    : { check, state: 'differs', text: `another field of view: ${x.text} and ${y.text}` };
}

function fieldOf(grid: SliceGrid) {
  const centreMm = pixelToPatient(grid, {
    column: (grid.columns - 1) / 2,
    row: (grid.rows - 1) / 2,
  });
  const widthMm = grid.columns * grid.pixelSpacingMm[1];
  const heightMm = grid.rows * grid.pixelSpacingMm[0];
  const size = `${widthMm.toFixed(1)} × ${heightMm.toFixed(1)} mm`;
  return { centreMm, widthMm, heightMm, text: `${size} around ${formatPosition(centreMm)}` };
}
