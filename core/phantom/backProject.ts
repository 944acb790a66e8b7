import type { ImageGrid } from './imageGrid.js';
import type { ParallelScan, Sinogram } from './parallelScan.js';
import { coversRow, type ViewWalk, viewWalk } from './viewWalk.js';

/** Rows that are worked on together, so that they stay in the processor's cache over all views. */
const BAND = 16;

/**
 * Back projection of filtered views with linear interpolation between detectors, per mm: (π/views)·Σ q(t).
 * Row after row of pixels. Pixels that lie beyond the detectors of a view get nothing from it.
 */
export function backProject(filtered: Sinogram, scan: ParallelScan, grid: ImageGrid): Float64Array {
  const { matrix } = grid;
  const last = scan.detectors - 1;
  const walks = Array.from({ length: scan.views }, (_, view) => viewWalk(view, scan, grid));
  // Four views in one pass over a row: the pixels are read and written once for the four.
  const fours = Array.from({ length: Math.floor(walks.length / 4) }, (_, index) =>
    walks.slice(index * 4, index * 4 + 4),
  );
  const rest = walks.slice(fours.length * 4);
  const image = new Float64Array(matrix * matrix);
  for (let top = 0; top < matrix; top += BAND) {
    const bottom = Math.min(matrix, top + BAND);
    for (const four of fours) {
      const [a, b, c, d] = four as [ViewWalk, ViewWalk, ViewWalk, ViewWalk];
      for (let row = top; row < bottom; row += 1) {
        if (four.every((walk) => coversRow(walk, row, last, matrix)))
          addFourViews(filtered, a, b, c, d, row, image, matrix);
        else for (const walk of four) addView(filtered, walk, row, last, image, matrix);
      }
    }
    for (const walk of rest)
      for (let row = top; row < bottom; row += 1) addView(filtered, walk, row, last, image, matrix);
  }
  const scale = Math.PI / scan.views;
  return image.map((sum) => sum * scale);
}

function addFourViews(
  q: Float64Array,
  a: ViewWalk,
  b: ViewWalk,
  c: ViewWalk,
  d: ViewWalk,
  row: number,
  image: Float64Array,
  columns: number,
): void {
  const { base: baseA, perColumn: stepA } = a;
  const { base: baseB, perColumn: stepB } = b;
  const { base: baseC, perColumn: stepC } = c;
  const { base: baseD, perColumn: stepD } = d;
  let atA = a.corner + row * a.perRow;
  let atB = b.corner + row * b.perRow;
  let atC = c.corner + row * c.perRow;
  let atD = d.corner + row * d.perRow;
  const end = (row + 1) * columns;
  for (let pixel = row * columns; pixel < end; pixel += 1) {
    const leftA = atA | 0;
    const leftB = atB | 0;
    const leftC = atC | 0;
    const leftD = atD | 0;
    // The row was found to lie between the detectors, so each index holds a number.
    const qA = q[baseA + leftA] as number;
    const qB = q[baseB + leftB] as number;
    const qC = q[baseC + leftC] as number;
    const qD = q[baseD + leftD] as number;
    image[pixel] =
      (image[pixel] as number) +
      qA +
      (atA - leftA) * ((q[baseA + leftA + 1] as number) - qA) +
      qB +
      (atB - leftB) * ((q[baseB + leftB + 1] as number) - qB) +
      qC +
      (atC - leftC) * ((q[baseC + leftC + 1] as number) - qC) +
      qD +
      (atD - leftD) * ((q[baseD + leftD + 1] as number) - qD);
    atA += stepA;
    atB += stepB;
    atC += stepC;
    atD += stepD;
  }
}

/** One view, over the pixels of a row that lie between its detectors: for rows that leave them, and views left over. */
function addView(
  q: Float64Array,
  { base, corner, perColumn, perRow }: ViewWalk,
  row: number,
  last: number,
  image: Float64Array,
  columns: number,
): void {
  const start = corner + row * perRow;
  const [first, end] = columnsWithin(start, perColumn, last, columns);
  for (let column = first; column < end; column += 1) {
    const at = start + column * perColumn;
    const left = at | 0;
    const value = q[base + left] as number;
    const next = q[base + left + 1] as number;
    const pixel = row * columns + column;
    image[pixel] = (image[pixel] as number) + value + (at - left) * (next - value);
  }
}

/** The columns, from the first to before the second, for which 0 ≤ start + column·step < last. */
function columnsWithin(
  start: number,
  step: number,
  last: number,
  columns: number,
): readonly [number, number] {
  const isWithin = (column: number): boolean => {
    const at = start + column * step;
    return at >= 0 && at < last;
  };
  const [low, high] = step > 0 ? [0, last] : [last, 0];
  const flat = Math.abs(step) < 1e-12;
  let first = flat ? 0 : Math.min(columns, Math.max(0, Math.floor((low - start) / step)));
  let end = flat ? columns : Math.max(0, Math.min(columns, Math.ceil((high - start) / step) + 1));
  // The divisions round: the ends are walked to the columns that really lie within.
  while (first < end && !isWithin(first)) first += 1;
  while (end > first && !isWithin(end - 1)) end -= 1;
  return [first, end];
}
