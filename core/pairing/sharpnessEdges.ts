import { type Cells, cellValueAt } from './sharpnessCells.js';

/** A strong, locally straight edge on the shared axes, rising along the direction. */
export interface EdgePlace {
  readonly xMm: number;
  readonly yMm: number;
  readonly direction: readonly [number, number];
  readonly lowHu: number;
  readonly highHu: number;
}

/** Reach of the piece along an edge that is looked at, from the middle, mm. */
export const ALONG_MM = 2.5;
const LEAST_STEP_HU = 100;
/** Clipped air and metal have no honest plateau. */
const LEAST_HU = -960;
const MOST_HU = 1300;
/** Distances from the middle at which both sides must be flat. */
const FLAT_MM = [3, 3.75, 4.5] as const;
const FLAT_PLACES = FLAT_MM.flatMap((across) =>
  [-ALONG_MM, 0, ALONG_MM].map((along) => [across, along] as const),
);
/** A plateau may vary by this share of the step. */
const PLATEAU_SHARE = 0.12;
const APART_MM = 8;
const MOST_PER_SLICE = 8;

/** Strong edges with a plateau on either side, steepest first, each by itself. Looked for on both stacks' mean. */
export function findEdges(cells: Cells): readonly EdgePlace[] {
  const { columns, rows } = cells;
  const steepness = steepnessOf(cells);
  const crest: { readonly column: number; readonly row: number; readonly steep: number }[] = [];
  for (let row = 2; row + 2 < rows; row += 1) {
    for (let column = 2; column + 2 < columns; column += 1) {
      const steep = steepness[row * columns + column] as number;
      if (steep >= (LEAST_STEP_HU / 2) ** 2) crest.push({ column, row, steep });
    }
  }
  crest.sort((a, b) => b.steep - a.steep);
  const chosen: EdgePlace[] = [];
  for (const { column, row } of crest) {
    if (chosen.length >= MOST_PER_SLICE) break;
    const xMm = cells.cornerMm[0] + (column + 0.5) * cells.sizeMm;
    const yMm = cells.cornerMm[1] + (row + 0.5) * cells.sizeMm;
    const alone = chosen.every(
      (other) => (other.xMm - xMm) ** 2 + (other.yMm - yMm) ** 2 >= APART_MM ** 2,
    );
    const direction = alone ? crestDirection(cells, steepness, column, row) : undefined;
    const place = direction && edgeAt(cells, xMm, yMm, direction);
    if (place) chosen.push(place);
  }
  return chosen;
}

/** Change over two cells, HU, squared; 0 at the border. */
function steepnessOf({ columns, rows, meanHu }: Cells): Float64Array {
  const squares = new Float64Array(columns * rows);
  for (let row = 1; row + 1 < rows; row += 1) {
    for (let at = row * columns + 1; at < (row + 1) * columns - 1; at += 1) {
      const gx = (meanHu[at + 1] as number) - (meanHu[at - 1] as number);
      const gy = (meanHu[at + columns] as number) - (meanHu[at - columns] as number);
      squares[at] = gx * gx + gy * gy;
    }
  }
  return squares;
}

/** The way up at a cell that is steeper than those before and behind it; undefined at all others. */
function crestDirection(
  { columns, meanHu }: Cells,
  steepness: Float64Array,
  column: number,
  row: number,
): readonly [number, number] | undefined {
  const at = row * columns + column;
  const here = steepness[at] as number;
  const size = Math.sqrt(here);
  const nx = ((meanHu[at + 1] as number) - (meanHu[at - 1] as number)) / size;
  const ny = ((meanHu[at + columns] as number) - (meanHu[at - columns] as number)) / size;
  const ahead = Math.round(ny) * columns + Math.round(nx);
  const isCrest =
    here >= (steepness[at + ahead] as number) && here >= (steepness[at - ahead] as number);
  return isCrest ? [nx, ny] : undefined;
}

function edgeAt(
  cells: Cells,
  xMm: number,
  yMm: number,
  direction: readonly [number, number],
): EdgePlace | undefined {
  const [nx, ny] = direction;
  const value = (across: number, along: number): number =>
    cellValueAt(cells, xMm + across * nx - along * ny, yMm + across * ny + along * nx);
  // The cheap tests first: few cells come to the others.
  const middle = value(0, 0);
  const [below, above] = [value(-FLAT_MM[1], 0), value(FLAT_MM[1], 0)];
  const step = above - below;
  if (!(step >= LEAST_STEP_HU && below >= LEAST_HU && above <= MOST_HU)) return undefined;
  // The middle of the step lies within this cell, and the edge runs straight along the piece.
  if (!(Math.abs(middle - (below + above) / 2) <= 0.3 * step)) return undefined;
  const straight = [-ALONG_MM, ALONG_MM].every(
    (along) => Math.abs(value(0, along) - middle) <= 0.25 * step,
  );
  if (!straight) return undefined;
  const low = FLAT_PLACES.map(([across, along]) => value(-across, along));
  const lowHu = mean(low);
  const high = FLAT_PLACES.map(([across, along]) => value(across, along));
  const highHu = mean(high);
  const limit = PLATEAU_SHARE * (highHu - lowHu);
  const flat =
    low.every((v) => Math.abs(v - lowHu) <= limit) &&
    high.every((v) => Math.abs(v - highHu) <= limit);
  return flat ? { xMm, yMm, direction, lowHu, highHu } : undefined;
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
