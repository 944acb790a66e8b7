import { backProject } from './backProject.js';
import type { ImageGrid } from './imageGrid.js';
import type { ParallelScan, Sinogram } from './parallelScan.js';
import { coversRow, type ViewWalk, viewWalk } from './viewWalk.js';

/** Rows that are worked on together, as in {@link backProject}. */
const BAND = 16;

/**
 * Two filtered sinograms of one scan, back projected into one grid: the same as {@link backProject} for each, in two
 * thirds of the time, because the places on the detector are found once for both. Falls back to the single one where
 * the grid leaves the detectors or the views don't come in fours.
 */
export function backProjectPair(
  first: Sinogram,
  second: Sinogram,
  scan: ParallelScan,
  grid: ImageGrid,
): readonly [Float64Array, Float64Array] {
  const { views } = scan;
  const { matrix } = grid;
  const walks = Array.from({ length: views }, (_, view) => viewWalk(view, scan, grid));
  const last = scan.detectors - 1;
  const inside = walks.every(
    (walk) => coversRow(walk, 0, last, matrix) && coversRow(walk, matrix - 1, last, matrix),
  );
  if (!inside || views % 4 !== 0)
    return [backProject(first, scan, grid), backProject(second, scan, grid)];
  const both = interleave(first, second);
  const images = [new Float64Array(matrix * matrix), new Float64Array(matrix * matrix)] as const;
  for (let top = 0; top < matrix; top += BAND) {
    const bottom = Math.min(matrix, top + BAND);
    for (let view = 0; view < views; view += 4) {
      const [a, b, c, d] = walks.slice(view, view + 4) as [ViewWalk, ViewWalk, ViewWalk, ViewWalk];
      for (let row = top; row < bottom; row += 1) addRow(both, a, b, c, d, row, matrix, ...images);
    }
  }
  const scale = Math.PI / views;
  return [images[0].map((sum) => sum * scale), images[1].map((sum) => sum * scale)];
}

/** Values of both sinograms side by side, so that one place in memory serves both. */
function interleave(first: Sinogram, second: Sinogram): Float64Array {
  const both = new Float64Array(first.length * 2);
  first.forEach((value, index) => {
    both[index * 2] = value;
    both[index * 2 + 1] = second[index] ?? 0;
  });
  return both;
}

function addRow(
  q: Float64Array,
  a: ViewWalk,
  b: ViewWalk,
  c: ViewWalk,
  d: ViewWalk,
  row: number,
  columns: number,
  firstImage: Float64Array,
  secondImage: Float64Array,
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
    const partA = atA - leftA;
    const partB = atB - leftB;
    const partC = atC - leftC;
    const partD = atD - leftD;
    const iA = 2 * (baseA + leftA);
    const iB = 2 * (baseB + leftB);
    const iC = 2 * (baseC + leftC);
    const iD = 2 * (baseD + leftD);
    // The grid was found to lie between the detectors, so each index holds a number.
    const qA = q[iA] as number;
    const qB = q[iB] as number;
    const qC = q[iC] as number;
    const qD = q[iD] as number;
    firstImage[pixel] =
      (firstImage[pixel] as number) +
      qA +
      partA * ((q[iA + 2] as number) - qA) +
      qB +
      partB * ((q[iB + 2] as number) - qB) +
      qC +
      partC * ((q[iC + 2] as number) - qC) +
      qD +
      partD * ((q[iD + 2] as number) - qD);
    const rA = q[iA + 1] as number;
    const rB = q[iB + 1] as number;
    const rC = q[iC + 1] as number;
    const rD = q[iD + 1] as number;
    secondImage[pixel] =
      (secondImage[pixel] as number) +
      rA +
      partA * ((q[iA + 3] as number) - rA) +
      rB +
      partB * ((q[iB + 3] as number) - rB) +
      rC +
      partC * ((q[iC + 3] as number) - rC) +
      rD +
      partD * ((q[iD + 3] as number) - rD);
    atA += stepA;
    atB += stepB;
    atC += stepC;
    atD += stepD;
  }
}
