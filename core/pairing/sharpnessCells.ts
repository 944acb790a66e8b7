import type { Plane } from './sharpnessPlane.js';
import type { PlanePair } from './sharpnessSlices.js';

/** Means of both stacks in squares of the shared axes: the smoothed copy on which places are looked for. */
export interface Cells {
  readonly sizeMm: number;
  readonly columns: number;
  readonly rows: number;
  /** Lower corner of the first cell, mm along the axes. */
  readonly cornerMm: readonly [number, number];
  /** Mean of both stacks' means, HU; NaN where a stack has no pixel or padding. */
  readonly meanHu: Float64Array;
}

const CELL_MM = 2;

/** Cells over what both planes show; undefined where they share less than a few cells. */
export function cellsOf({ first, second }: PlanePair): Cells | undefined {
  // At least two pixels to a side, so that a cell is a mean on the coarser stack too.
  const sizeMm = Math.max(CELL_MM, 2 * Math.max(...first.spacingMm, ...second.spacingMm));
  const [ax, ay, aX, aY] = extentMm(first);
  const [bx, by, bX, bY] = extentMm(second);
  const cornerMm = [Math.max(ax, bx), Math.max(ay, by)] as const;
  const columns = Math.floor((Math.min(aX, bX) - cornerMm[0]) / sizeMm);
  const rows = Math.floor((Math.min(aY, bY) - cornerMm[1]) / sizeMm);
  if (columns < 4 || rows < 4) return undefined;
  const frame = { sizeMm, columns, rows, cornerMm };
  const a = cellMeans(first, frame);
  const b = cellMeans(second, frame);
  return { ...frame, meanHu: a.map((value, index) => (value + (b[index] ?? Number.NaN)) / 2) };
}

function extentMm({
  originMm,
  spacingMm,
  columns,
  rows,
}: Plane): readonly [number, number, number, number] {
  const [x, y] = [originMm[0] - spacingMm[0] / 2, originMm[1] - spacingMm[1] / 2];
  return [x, y, x + columns * spacingMm[0], y + rows * spacingMm[1]];
}

function cellMeans(plane: Plane, frame: Omit<Cells, 'meanHu'>): Float64Array {
  const { columns, rows, sizeMm, cornerMm } = frame;
  // First pixel of each cell, and of what comes after the last one.
  const starts = (origin: number, spacing: number, corner: number, cells: number): Int32Array =>
    Int32Array.from({ length: cells + 1 }, (_, cell) =>
      Math.max(0, Math.ceil((corner + cell * sizeMm - origin) / spacing - 1e-9)),
    );
  const across = starts(plane.originMm[0], plane.spacingMm[0], cornerMm[0], columns);
  const down = starts(plane.originMm[1], plane.spacingMm[1], cornerMm[1], rows);
  const { slope, intercept } = plane.pixels.rescale ?? { slope: 1, intercept: 0 };
  const means = new Float64Array(columns * rows);
  for (let row = 0; row < rows; row += 1) {
    const [top, bottom] = [down[row] as number, Math.min(down[row + 1] as number, plane.rows)];
    for (let column = 0; column < columns; column += 1) {
      const left = across[column] as number;
      const right = Math.min(across[column + 1] as number, plane.columns);
      let sum = 0;
      for (let y = top; y < bottom; y += 1)
        sum += runSum(plane, y * plane.columns + left, y * plane.columns + right);
      means[row * columns + column] = (sum / ((bottom - top) * (right - left))) * slope + intercept;
    }
  }
  return means;
}

/** Sum of a run of stored values; NaN where one is padding. */
function runSum({ stored, pixels: { padding } }: Plane, from: number, to: number): number {
  let sum = 0;
  for (let at = from; at < to; at += 1) sum += stored[at] as number;
  if (padding === undefined) return sum;
  for (let at = from; at < to; at += 1) {
    const value = stored[at] as number;
    if (value >= padding.low && value <= padding.high) return Number.NaN;
  }
  return sum;
}

/** Mean at a place between cell centres, by straight lines both ways; NaN beyond the outer centres. */
export function cellValueAt(cells: Cells, xMm: number, yMm: number): number {
  const column = (xMm - cells.cornerMm[0]) / cells.sizeMm - 0.5;
  const row = (yMm - cells.cornerMm[1]) / cells.sizeMm - 0.5;
  const [left, top] = [Math.floor(column), Math.floor(row)];
  if (left < 0 || top < 0 || left + 1 >= cells.columns || top + 1 >= cells.rows) return Number.NaN;
  const [u, v] = [column - left, row - top];
  const at = top * cells.columns + left;
  const { meanHu, columns } = cells;
  const upper = (1 - u) * (meanHu[at] as number) + u * (meanHu[at + 1] as number);
  const lower =
    (1 - u) * (meanHu[at + columns] as number) + u * (meanHu[at + columns + 1] as number);
  return (1 - v) * upper + v * lower;
}
