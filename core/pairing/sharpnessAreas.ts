import { detrendQuadratic } from '../quality/index.js';
import { type Cells, cellValueAt } from './sharpnessCells.js';

/** A square without structure, on the shared axes. */
export interface AreaPlace {
  readonly xMm: number;
  readonly yMm: number;
  readonly sizeMm: number;
}

/** What blood, muscle and soft tissue have: no air, lung, fat, bone, calcium or metal. */
const LEAST_HU = -50;
const MOST_HU = 600;
/** Sides of an area in cells: 12 mm where there is room, else 8 mm. A margin of one cell on each side stays even too. */
const SIDES_CELLS = [6, 4] as const;
const MARGIN_CELLS = 1;
/** All that a heart has room for: the evenest alone have less noise than the rest. */
const MOST_PER_SLICE = 24;
/** A window may vary as twice the evenest tenth of all windows: noise differs over the body, structure by more. */
const OVER_FLOOR = 2;
/** Below this, unevenness doesn't matter; above that, no window counts as even whatever the rest is like. */
const ALWAYS_EVEN_HU = 2;
const NEVER_EVEN_HU = 25;
/** A slow change across the window: contrast that mixes, hardening of the beam. More is an edge out of focus. */
const MOST_SPAN_HU = 60;
/** Rays in which the wall of a bone is looked for, how far from the middle, and how much denser it is. */
const DIRECTIONS = [0, 1, 2, 3, 4, 5, 6, 7].map(
  (eighth) => [Math.cos((eighth * Math.PI) / 4), Math.sin((eighth * Math.PI) / 4)] as const,
);
const WALL_REACH_MM = [6, 8, 10, 12, 14, 16, 18, 20] as const;
const WALL_HU = 100;

/** A square of cells; its side holds the margins. */
interface Window {
  readonly column: number;
  readonly row: number;
  readonly side: number;
}

/** Windows of soft tissue alone that are even enough to be looked at, evenest first, for both sides. */
export type SoftWindows = readonly (readonly (Window & { readonly sdHu: number })[])[];

/** All windows of a slice that may hold a uniform area. */
export function softWindows(cells: Cells): SoftWindows {
  const tables = summedAreas(cells);
  return SIDES_CELLS.map((side) => windowsOf(cells, tables, side + 2 * MARGIN_CELLS));
}

/**
 * How much cells vary where there is nothing but noise, HU: the tenth part of the windows that varies least, over
 * all slices. Undefined where no window is of soft tissue alone.
 */
export function evennessFloorHu(all: readonly SoftWindows[]): number | undefined {
  const sds = Float64Array.from(all.flatMap((sides) => sides[1] ?? []).map(({ sdHu }) => sdHu));
  sds.sort();
  return sds[Math.floor(sds.length / 10)];
}

/**
 * Square areas without structure, evenest first, not overlapping. Looked for on means of 2 mm cells of both stacks
 * together, so that pixel noise hides nothing and neither stack is preferred.
 */
export function findAreas(
  cells: Cells,
  windows: SoftWindows,
  floorHu: number,
): readonly AreaPlace[] {
  const limitHu = Math.min(NEVER_EVEN_HU, Math.max(ALWAYS_EVEN_HU, OVER_FLOOR * floorHu));
  const taken = new Uint8Array(cells.columns * cells.rows);
  const areas: AreaPlace[] = [];
  for (const window of windows.flat()) {
    if (areas.length >= MOST_PER_SLICE) break;
    const side = window.side - 2 * MARGIN_CELLS;
    const inner = { column: window.column + MARGIN_CELLS, row: window.row + MARGIN_CELLS, side };
    if (anyTaken(taken, cells.columns, inner) || !isEven(cells, window, limitHu)) continue;
    const place = {
      xMm: cells.cornerMm[0] + (inner.column + side / 2) * cells.sizeMm,
      yMm: cells.cornerMm[1] + (inner.row + side / 2) * cells.sizeMm,
      sizeMm: side * cells.sizeMm,
    };
    if (isEnclosedByBone(cells, place)) continue;
    mark(taken, cells.columns, inner);
    areas.push(place);
  }
  return areas;
}

/** Sums over all cells above and to the left (Crow 1984, doi 10.1145/800031.808600): any window from four corners. */
interface SummedAreas {
  readonly values: Float64Array;
  readonly squares: Float64Array;
  /** Cells that are not soft tissue. */
  readonly strange: Int32Array;
}

function summedAreas({ columns, rows, meanHu }: Cells): SummedAreas {
  const stride = columns + 1;
  const values = new Float64Array(stride * (rows + 1));
  const squares = new Float64Array(values.length);
  const strange = new Int32Array(values.length);
  for (let row = 0; row < rows; row += 1) {
    let [sum, square, odd] = [0, 0, 0];
    for (let column = 0; column < columns; column += 1) {
      const value = meanHu[row * columns + column] as number;
      // Not a number is not soft either.
      if (value >= LEAST_HU && value <= MOST_HU) {
        sum += value;
        square += value * value;
      } else odd += 1;
      const here = (row + 1) * stride + column + 1;
      values[here] = sum + (values[here - stride] as number);
      squares[here] = square + (squares[here - stride] as number);
      strange[here] = odd + (strange[here - stride] as number);
    }
  }
  return { values, squares, strange };
}

function windowsOf(
  { columns, rows }: Cells,
  { values, squares, strange }: SummedAreas,
  side: number,
): SoftWindows[number] {
  const stride = columns + 1;
  const count = side * side;
  const found: (Window & { readonly sdHu: number })[] = [];
  const inside = (table: Float64Array | Int32Array, top: number, bottom: number): number =>
    (table[bottom + side] as number) -
    (table[bottom] as number) -
    (table[top + side] as number) +
    (table[top] as number);
  for (let row = 0; row + side <= rows; row += 1) {
    for (let column = 0; column + side <= columns; column += 1) {
      const top = row * stride + column;
      const bottom = top + side * stride;
      if (inside(strange, top, bottom) > 0) continue;
      const mean = inside(values, top, bottom) / count;
      const variance = inside(squares, top, bottom) / count - mean * mean;
      // A slow change may make the SD larger than that of the noise, but not larger than its span.
      if (variance > MOST_SPAN_HU * MOST_SPAN_HU) continue;
      found.push({ column, row, side, sdHu: Math.sqrt(Math.max(0, variance)) });
    }
  }
  return found.sort((a, b) => a.sdHu - b.sdHu);
}

/** Marrow is soft, but walled in by bone: in most directions something clearly denser comes soon. */
function isEnclosedByBone(cells: Cells, { xMm, yMm }: AreaPlace): boolean {
  const here = cellValueAt(cells, xMm, yMm);
  const denser = DIRECTIONS.filter(([dx, dy]) =>
    WALL_REACH_MM.some(
      (reach) => cellValueAt(cells, xMm + reach * dx, yMm + reach * dy) > here + WALL_HU,
    ),
  );
  return denser.length > DIRECTIONS.length / 2;
}

/** What remains after a second-order surface is no more than noise, nowhere stands out, and the surface is flat. */
function isEven(cells: Cells, { column, row, side }: Window, limitHu: number): boolean {
  const values = Float64Array.from(
    { length: side * side },
    (_, index) =>
      cells.meanHu[
        (row + Math.floor(index / side)) * cells.columns + column + (index % side)
      ] as number,
  );
  const rest = detrendQuadratic(values, side, side);
  const surface = values.map((value, index) => value - (rest[index] ?? 0));
  if (Math.max(...surface) - Math.min(...surface) > MOST_SPAN_HU) return false;
  const sdHu = Math.sqrt(rest.reduce((sum, value) => sum + value * value, 0) / rest.length);
  return sdHu <= limitHu && rest.every((value) => Math.abs(value) <= 4 * limitHu);
}

function anyTaken(taken: Uint8Array, columns: number, { column, row, side }: Window): boolean {
  for (let y = row; y < row + side; y += 1)
    for (let x = column; x < column + side; x += 1) if (taken[y * columns + x] === 1) return true;
  return false;
}

function mark(taken: Uint8Array, columns: number, { column, row, side }: Window): void {
  for (let y = row; y < row + side; y += 1)
    taken.fill(1, y * columns + column, y * columns + column + side);
}
