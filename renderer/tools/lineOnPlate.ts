import {
  add,
  distance,
  dot,
  gridNormal,
  normalise,
  scale,
  subtract,
  type Vec3,
} from '../../core/geometry/index.js';
import type { BandLine } from '../../core/region/index.js';
import type { PlatePoint } from '../plates/platePoint.js';
import { type PlateTransform, patientToPlate } from '../plates/plateTransform.js';
import { distanceToSegment } from './outlinePoints.js';

/** Where a line can be taken hold of. */
export type LinePart = 'from' | 'to' | 'body';

/** A shorter line has no sides to an edge; it was a slip of the hand, mm. */
export const LEAST_LINE_MM = 2;

const HANDLE_PX = 7;
const BODY_PX = 5;

/** What of a line a place on the plate hits: an end before the body; undefined beside it. */
export function hitLine(
  line: BandLine,
  transform: PlateTransform,
  point: PlatePoint,
  withHandles: boolean,
): LinePart | undefined {
  const from = patientToPlate(transform, line.fromMm);
  const to = patientToPlate(transform, line.toMm);
  const [near, far] = [from, to].map(({ x, y }) => Math.hypot(x - point.x, y - point.y));
  if (withHandles && Math.min(near ?? Infinity, far ?? Infinity) <= HANDLE_PX)
    return (near ?? Infinity) <= (far ?? Infinity) ? 'from' : 'to';
  return distanceToSegment(point, from, to) <= BODY_PX ? 'body' : undefined;
}

/** The line after one of its ends, or all of it, was moved. */
export function movedLine(line: BandLine, part: LinePart, by: Vec3): BandLine {
  return {
    fromMm: part === 'to' ? line.fromMm : add(line.fromMm, by),
    toMm: part === 'from' ? line.toMm : add(line.toMm, by),
    bandMm: line.bandMm,
  };
}

/** The end of a line from a place to another, turned to the nearest of eight directions on the slice. */
export function straightened(fromMm: Vec3, toMm: Vec3, { grid }: PlateTransform): Vec3 {
  const by = subtract(toMm, fromMm);
  const x = dot(by, grid.rowDirection);
  const y = dot(by, grid.columnDirection);
  const angle = (Math.round(Math.atan2(y, x) / (Math.PI / 4)) * Math.PI) / 4;
  const lengthMm = Math.hypot(x, y);
  return add(
    fromMm,
    add(
      scale(grid.rowDirection, lengthMm * Math.cos(angle)),
      scale(grid.columnDirection, lengthMm * Math.sin(angle)),
    ),
  );
}

/** The four corners of a line's band, in patient space; none for a line without length. */
export function bandCorners(
  { fromMm, toMm, bandMm }: BandLine,
  { grid }: PlateTransform,
): readonly Vec3[] {
  if (distance(fromMm, toMm) === 0) return [];
  const [x, y, z] = subtract(toMm, fromMm);
  const [a, b, c] = gridNormal(grid);
  const aside = normalise([b * z - c * y, c * x - a * z, a * y - b * x]);
  if (aside === undefined) return [];
  const half = scale(aside, bandMm / 2);
  const minus = scale(half, -1);
  return [add(fromMm, half), add(toMm, half), add(toMm, minus), add(fromMm, minus)];
}
