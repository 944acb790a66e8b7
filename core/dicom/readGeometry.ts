import { cross, dot, length, normalise, type SliceGrid, type Vec3 } from '../geometry/index.js';
import { type Finding, type Result, refuse, success } from '../result.js';
import type { Attributes } from './attributes.js';

/** How far direction cosines may be from unit length and from a right angle before the file gives no geometry. */
const COSINE_TOLERANCE = 1e-3;

/** Rounding of a Decimal String's 16 characters stays below this; more than it is put right, with a finding. */
const COSINE_ROUNDING = 1e-5;

/** Largest slice that is read, bytes of stored values: 16384 × 16384. Headers that ask for more are damage. */
const MOST_SLICE_BYTES = 2 ** 29;

/** The pixel grid of a slice, and what was put right. */
export interface GeometryReading {
  readonly grid: SliceGrid;
  readonly findings: readonly Finding[];
}

/**
 * The pixel grid of a slice from Image Position, Image Orientation and Pixel Spacing (PS3.3 C.7.6.2).
 * Nothing is invented: a missing or impossible position or orientation refuses the slice; without a pixel spacing it is
 * unscaled, and no other spacing of the file stands in for it. Directions that are off by less than 1e-3 are made unit
 * and orthogonal.
 */
export function readGeometry(attributes: Attributes): Result<GeometryReading> {
  const rows = attributes.unsignedShort('x00280010');
  const columns = attributes.unsignedShort('x00280011');
  if (!rows || !columns) return refuse('no-image', 'No image: Rows or Columns is missing or zero.');
  const sliceBytes = rows * columns * 2;
  if (sliceBytes > MOST_SLICE_BYTES) {
    const gigabytes = (sliceBytes / 2 ** 30).toFixed(1);
    return refuse('too-large', `${rows} × ${columns} pixels: one slice needs ${gigabytes} GB.`, {
      tag: '(0028,0010)',
    });
  }

  const position = numbers(attributes, 'x00200032', 3);
  if (!position) return refuseMissing('Image Position (Patient)', '(0020,0032)');
  const orientation = numbers(attributes, 'x00200037', 6);
  if (!orientation) return refuseMissing('Image Orientation (Patient)', '(0020,0037)');
  const spacing = numbers(attributes, 'x00280030', 2);
  const isScaled = spacing?.every((value) => value > 0) ?? false;

  const directions = orthonormal(triple(orientation, 0), triple(orientation, 3));
  if (directions === undefined) {
    return refuse(
      'bad-orientation',
      'No geometry: the direction cosines of Image Orientation (Patient) are not unit vectors at a right angle.',
      { tag: '(0020,0037)' },
    );
  }
  return success({
    grid: {
      positionMm: triple(position, 0),
      rowDirection: directions.row,
      columnDirection: directions.column,
      pixelSpacingMm: spacing && isScaled ? [at(spacing, 0), at(spacing, 1)] : [1, 1],
      rows,
      columns,
      ...(!isScaled && { unscaled: true as const }),
    },
    findings: [...(directions.mended ? [MENDED] : []), ...(isScaled ? [] : [NO_SPACING])],
  });
}

const MENDED: Finding = {
  code: 'orientation-mended',
  text: 'The direction cosines were not quite unit vectors at a right angle and were put right.',
};

const NO_SPACING: Finding = {
  code: 'no-pixel-spacing',
  text: 'The file has no pixel spacing: it is shown pixel by pixel, nothing is measured on it, and it is part of no pair.',
};

function refuseMissing(name: string, tag: string): Result<never> {
  return refuse('no-geometry', `No geometry: ${name} is missing or is no number.`, { tag });
}

function numbers(
  attributes: Attributes,
  tag: string,
  count: number,
): readonly number[] | undefined {
  const values = attributes.decimals(tag);
  if (values?.length !== count) return undefined;
  const defined = values.filter((value) => value !== undefined);
  return defined.length === count ? defined : undefined;
}

function at(values: readonly number[], index: number): number {
  const value = values[index];
  if (value === undefined) throw new RangeError(`no value at index: ${index}`);
  return value;
}

function triple(values: readonly number[], from: number): Vec3 {
  return [at(values, from), at(values, from + 1), at(values, from + 2)];
}

function orthonormal(
  row: Vec3,
  column: Vec3,
): { row: Vec3; column: Vec3; mended: boolean } | undefined {
  const error = Math.max(
    Math.abs(length(row) - 1),
    Math.abs(length(column) - 1),
    Math.abs(dot(row, column)),
  );
  if (!(error <= COSINE_TOLERANCE)) return undefined;
  const unitRow = normalise(row);
  const normal = unitRow && normalise(cross(unitRow, column));
  if (!unitRow || !normal) return undefined;
  return { row: unitRow, column: cross(normal, unitRow), mended: error > COSINE_ROUNDING };
}
