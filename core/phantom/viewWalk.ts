import { firstPixelMm, type ImageGrid, pixelMm } from './imageGrid.js';
import { detectorMm, type ParallelScan, viewAngleRad } from './parallelScan.js';

/** Where the pixels of a view lie in the filtered sinogram: corner + row·perRow + column·perColumn, in detectors. */
export interface ViewWalk {
  readonly corner: number;
  readonly perColumn: number;
  readonly perRow: number;
  /** Index of the view's first detector. */
  readonly base: number;
}

/** How one view is walked through for a grid. */
export function viewWalk(view: number, scan: ParallelScan, grid: ImageGrid): ViewWalk {
  const theta = viewAngleRad(scan, view);
  const [x, y] = firstPixelMm(grid);
  const step = pixelMm(grid) / scan.pitchMm;
  const tMm = x * Math.cos(theta) + y * Math.sin(theta);
  return {
    corner: (tMm - detectorMm(scan, 0)) / scan.pitchMm,
    perColumn: Math.cos(theta) * step,
    perRow: Math.sin(theta) * step,
    base: view * scan.detectors,
  };
}

/** Whether every pixel of a row lies safely between the first and the last detector. */
export function coversRow(
  { corner, perRow, perColumn }: ViewWalk,
  row: number,
  last: number,
  columns: number,
): boolean {
  const start = corner + row * perRow;
  const end = start + (columns - 1) * perColumn;
  // The margin is for what adding up the steps rounds.
  return Math.min(start, end) > 1e-6 && Math.max(start, end) < last - 1e-6;
}
