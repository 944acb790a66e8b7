import { dot, type PixelPoint, patientToPixel, type SliceGrid } from '../geometry/index.js';
import type { Ellipse, Outline, Shape } from './shape.js';

/** Pixel centres on the edge belong to the region; this much rounding is forgiven, relative to the radius or pixels. */
const EDGE = 1e-9;

/** Pixels of a slice whose centres lie in a shape, edge included. */
export interface PixelsInside {
  /** Indices into the slice, row × columns + column, ascending. */
  readonly indices: Int32Array;
  /** The shape reaches over the border of the image. */
  readonly overBorder: boolean;
}

/** Which pixels of a slice a shape holds. The shape is projected on the slice along its normal. */
export function pixelsInside(shape: Shape, grid: SliceGrid): PixelsInside {
  const indices: number[] = [];
  const overBorder = visitRuns(shape, grid, (from, end) => {
    for (let index = from; index < end; index++) indices.push(index);
  });
  return { indices: Int32Array.from(indices), overBorder };
}

/** A run of neighbouring pixels of one row: from the first index to before the end. */
export type VisitRun = (from: number, end: number) => void;

/**
 * Calls back with each run of pixels that a shape holds, ascending, and makes nothing on the way.
 *
 * @returns whether the shape reaches over the border of the image
 */
export function visitRuns(shape: Shape, grid: SliceGrid, visit: VisitRun): boolean {
  return shape.kind === 'ellipse'
    ? visitEllipse(shape, grid, visit)
    : visitOutline(shape, grid, visit);
}

function visitEllipse(shape: Ellipse, grid: SliceGrid, visit: VisitRun): boolean {
  const { rowDirection, columnDirection, pixelSpacingMm, columns } = grid;
  const [a, b] = shape.radiiMm;
  const u = shape.u ?? rowDirection;
  const v = shape.v ?? columnDirection;
  const middle = patientToPixel(grid, shape.centreMm);
  // A step of one column or row, in units of the half axes.
  const uColumn = (dot(rowDirection, u) * pixelSpacingMm[1]) / a;
  const uRow = (dot(columnDirection, u) * pixelSpacingMm[0]) / a;
  const vColumn = (dot(rowDirection, v) * pixelSpacingMm[1]) / b;
  const vRow = (dot(columnDirection, v) * pixelSpacingMm[0]) / b;
  // Half extent of the ellipse along a direction d is √((a u·d)² + (b v·d)²).
  const halfColumns =
    Math.hypot(a * dot(u, rowDirection), b * dot(v, rowDirection)) / pixelSpacingMm[1];
  const halfRows =
    Math.hypot(a * dot(u, columnDirection), b * dot(v, columnDirection)) / pixelSpacingMm[0];
  const box = clip(
    grid,
    middle.column - halfColumns,
    middle.column + halfColumns,
    middle.row - halfRows,
    middle.row + halfRows,
  );
  const isInside = (across: number, down: number): boolean => {
    const alongU = across * uColumn + down * uRow;
    const alongV = across * vColumn + down * vRow;
    return alongU * alongU + alongV * alongV <= 1 + EDGE;
  };
  // On a row the ellipse is where A x² + 2 B x + C ≤ 0.
  const squared = uColumn * uColumn + vColumn * vColumn;
  const crossed = uColumn * uRow + vColumn * vRow;
  const rowSquared = uRow * uRow + vRow * vRow;
  for (let row = box.top; row <= box.bottom; row++) {
    const down = row - middle.row;
    const mid = (-crossed * down) / squared;
    const half = Math.sqrt(
      Math.max(0, mid * mid - (rowSquared * down * down - 1 - EDGE) / squared),
    );
    let first = Math.max(box.left, Math.floor(middle.column + mid - half));
    let last = Math.min(box.right, Math.ceil(middle.column + mid + half));
    // The root rounds: the ends are walked to the pixels that really lie inside.
    while (first <= last && !isInside(first - middle.column, down)) first++;
    while (last >= first && !isInside(last - middle.column, down)) last--;
    if (first <= last) visit(row * columns + first, row * columns + last + 1);
  }
  return box.overBorder;
}

/**
 * Polygon by rows, even-odd: pixels between each pair of crossings, and those on an edge. An outline that crosses
 * itself counts its overlaps as holes, as the even-odd rule does.
 */
function visitOutline(shape: Outline, grid: SliceGrid, visit: VisitRun): boolean {
  const corners = shape.pointsMm.map((point) => patientToPixel(grid, point));
  let [left, right, top, bottom] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const { column, row } of corners) {
    left = Math.min(left, column);
    right = Math.max(right, column);
    top = Math.min(top, row);
    bottom = Math.max(bottom, row);
  }
  const box = clip(grid, left, right, top, bottom);
  const inside = new Uint8Array(Math.max(0, box.right - box.left + 1));
  for (let row = box.top; row <= box.bottom; row++) {
    inside.fill(0);
    fillRow(corners, row, (from, to) => {
      const first = Math.max(box.left, Math.ceil(from - EDGE));
      const last = Math.min(box.right, Math.floor(to + EDGE));
      for (let column = first; column <= last; column++) inside[column - box.left] = 1;
    });
    const start = row * grid.columns + box.left;
    for (let at = 0; at < inside.length; at++) {
      if (inside[at] === 0) continue;
      const from = at;
      while (at < inside.length && inside[at] === 1) at++;
      visit(start + from, start + at);
    }
  }
  return box.overBorder;
}

/** Calls back with each stretch of a row that a polygon covers, its edges as stretches of their own. */
function fillRow(
  corners: readonly PixelPoint[],
  row: number,
  fill: (from: number, to: number) => void,
): void {
  const crossings: number[] = [];
  for (let i = 0, j = corners.length - 1; i < corners.length; j = i++) {
    const a = corners[i];
    const b = corners[j];
    if (a === undefined || b === undefined) continue;
    const low = Math.min(a.row, b.row);
    const high = Math.max(a.row, b.row);
    if (row < low - EDGE || row > high + EDGE) continue;
    if (high - low < EDGE) {
      fill(Math.min(a.column, b.column), Math.max(a.column, b.column));
      continue;
    }
    const part = Math.min(1, Math.max(0, (row - a.row) / (b.row - a.row)));
    const column = a.column + part * (b.column - a.column);
    fill(column, column);
    if (a.row > row !== b.row > row) crossings.push(column);
  }
  crossings.sort((x, y) => x - y);
  for (let i = 0; i + 1 < crossings.length; i += 2) {
    fill(crossings[i] ?? 0, crossings[i + 1] ?? 0);
  }
}

interface Box {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly overBorder: boolean;
}

/** The whole pixels of a rectangle that are in the image. */
function clip(
  { rows, columns }: SliceGrid,
  left: number,
  right: number,
  top: number,
  bottom: number,
): Box {
  const slack = 1e-6;
  return {
    left: Math.max(0, Math.ceil(left - slack)),
    right: Math.min(columns - 1, Math.floor(right + slack)),
    top: Math.max(0, Math.ceil(top - slack)),
    bottom: Math.min(rows - 1, Math.floor(bottom + slack)),
    overBorder: left < -0.5 || right > columns - 0.5 || top < -0.5 || bottom > rows - 0.5,
  };
}
