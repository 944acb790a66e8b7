import {
  add,
  dot,
  pixelToPatient,
  type SliceGrid,
  scale,
  subtract,
  type Vec3,
} from '../geometry/index.js';
import { type HuPlane, type SampleGrid, samplePlane } from './huPlane.js';

/** Squares in one slice at which two stacks are compared: 64 samples where a small field holds no larger ones. */
const SIZES = [128, 64] as const;
/** A field must hold this many squares along each side before the larger square is taken. */
const SQUARES_ALONG = 1.75;
/** Squares are offered at half overlap; those that are taken lie this part of their size apart at least. */
const LEAST_DISTANCE = 0.7;
const MOST_SQUARES = 4;
/** Samples around a square that a blur or a shift may still need. */
export const SQUARE_MARGIN = 8;
/** Structure is judged on every so many-th sample, and on soft tissue and vessels: not on lung and bone alone. */
const COARSE = 4;
const STRUCTURE_FROM_HU = -150;
const STRUCTURE_TO_HU = 500;

/** Step of the common sampling: the coarser pixel spacing of the two, mm. */
export function commonStepMm(a: SliceGrid, b: SliceGrid): number {
  return Math.max(...a.pixelSpacingMm, ...b.pixelSpacingMm);
}

/** Side of the squares for two fields, in samples; undefined where the common field is too small. */
export function squareSize(a: SliceGrid, b: SliceGrid): number | undefined {
  const { widthMm, heightMm } = commonField(a, b);
  const along = Math.min(widthMm, heightMm) / commonStepMm(a, b);
  const [large, small] = SIZES;
  if (along >= SQUARES_ALONG * large) return large;
  return along >= small + 2 * SQUARE_MARGIN ? small : undefined;
}

/**
 * The squares of the common field that show most structure on both planes, best first. They follow the first plane's
 * axes; a square that reaches out of either image or over padding is not offered.
 */
export function structuredSquares(
  first: HuPlane,
  second: HuPlane,
  size: number,
): readonly SampleGrid[] {
  const { grid } = first;
  const stepMm = commonStepMm(grid, second.grid);
  const field = commonField(grid, second.grid);
  const sideMm = (size - 1) * stepMm;
  const marginMm = SQUARE_MARGIN * stepMm;
  const offered: { square: SampleGrid; structure: number; centreMm: Vec3 }[] = [];
  for (const x of starts(field.widthMm, sideMm, marginMm)) {
    for (const y of starts(field.heightMm, sideMm, marginMm)) {
      const along = add(scale(grid.rowDirection, x), scale(grid.columnDirection, y));
      const { rowDirection, columnDirection } = grid;
      const cornerMm = add(field.cornerMm, along);
      const square = { cornerMm, rowDirection, columnDirection, stepMm, size };
      const coarse = { ...square, stepMm: stepMm * COARSE, size: size / COARSE };
      const [a, b] = [samplePlane(first, coarse), samplePlane(second, coarse)];
      if (a === undefined || b === undefined) continue;
      const structure = Math.min(structureOf(a, coarse.size), structureOf(b, coarse.size));
      const half = add(scale(rowDirection, sideMm / 2), scale(columnDirection, sideMm / 2));
      offered.push({ square, structure, centreMm: add(cornerMm, half) });
    }
  }
  offered.sort((a, b) => b.structure - a.structure);
  const taken: typeof offered = [];
  for (const one of offered) {
    if (taken.length === MOST_SQUARES || !(one.structure > 0)) break;
    const isApart = taken.every(({ centreMm }) => {
      const apart = subtract(centreMm, one.centreMm);
      const [x, y] = [dot(apart, grid.rowDirection), dot(apart, grid.columnDirection)];
      return Math.max(Math.abs(x), Math.abs(y)) >= LEAST_DISTANCE * sideMm;
    });
    if (isApart) taken.push(one);
  }
  return taken.map(({ square }) => square);
}

/** Centre of a square in the plane it was made for. */
export function squareCentre({
  cornerMm,
  rowDirection,
  columnDirection,
  stepMm,
  size,
}: SampleGrid): Vec3 {
  const half = ((size - 1) / 2) * stepMm;
  return add(cornerMm, add(scale(rowDirection, half), scale(columnDirection, half)));
}

/** The part of the first field that the second one covers too, along the first one's axes. */
function commonField(a: SliceGrid, b: SliceGrid) {
  const corners = [
    { column: 0, row: 0 },
    { column: b.columns - 1, row: 0 },
    { column: 0, row: b.rows - 1 },
    { column: b.columns - 1, row: b.rows - 1 },
  ].map((corner) => subtract(pixelToPatient(b, corner), a.positionMm));
  const xs = corners.map((corner) => dot(corner, a.rowDirection));
  const ys = corners.map((corner) => dot(corner, a.columnDirection));
  const left = Math.max(0, Math.min(...xs));
  const top = Math.max(0, Math.min(...ys));
  const right = Math.min((a.columns - 1) * a.pixelSpacingMm[1], Math.max(...xs));
  const bottom = Math.min((a.rows - 1) * a.pixelSpacingMm[0], Math.max(...ys));
  return {
    cornerMm: add(a.positionMm, add(scale(a.rowDirection, left), scale(a.columnDirection, top))),
    widthMm: Math.max(0, right - left),
    heightMm: Math.max(0, bottom - top),
  };
}

/** Where squares begin along one side: evenly, at about half overlap, a margin inside the field. */
function starts(fieldMm: number, sideMm: number, marginMm: number): readonly number[] {
  const roomMm = fieldMm - sideMm - 2 * marginMm;
  if (roomMm < 0) return [];
  const count = Math.max(1, Math.floor(roomMm / (sideMm / 2)) + 1);
  return Array.from({ length: count }, (_, index) =>
    count === 1 ? marginMm + roomMm / 2 : marginMm + (index * roomMm) / (count - 1),
  );
}

/** Mean square of the differences between neighbours, HU². */
function structureOf(samples: Float64Array, size: number): number {
  const clipped = samples.map((value) =>
    Math.min(STRUCTURE_TO_HU, Math.max(STRUCTURE_FROM_HU, value)),
  );
  let sum = 0;
  for (let row = 1; row < size; row += 1) {
    for (let column = 1; column < size; column += 1) {
      const index = row * size + column;
      const here = clipped[index] ?? 0;
      sum += (here - (clipped[index - 1] ?? 0)) ** 2 + (here - (clipped[index - size] ?? 0)) ** 2;
    }
  }
  return sum / (size - 1) ** 2;
}
