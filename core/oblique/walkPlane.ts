import type { Walk } from './cutPlane.js';
import type { Layer, PlaneInStack } from './layers.js';

/**
 * Walks over all pixels of a plane, row by row, each row towards higher slices, so that what belongs to a pair of slices is
 * read when they change and not for each pixel.
 *
 * @param run called with the walk and the slice below it (−1 below all); walks on until the slice above is reached
 */
export function walkPlane(
  place: PlaneInStack,
  planeColumns: number,
  planeRows: number,
  run: (walk: Walk, below: number) => void,
): void {
  const { layers, alongStep, columnStep, rowStep } = place;
  const isUpwards = alongStep[0] >= 0;
  const step = isUpwards ? 1 : -1;
  const start = isUpwards ? 0 : planeColumns - 1;
  const walk: Walk = {
    columns: planeColumns,
    at: 0,
    step,
    walked: 0,
    along: 0,
    alongStep: step * alongStep[0],
    column: 0,
    columnStep: step * columnStep[0],
    row: 0,
    rowStep: step * rowStep[0],
  };
  for (let line = 0; line < planeRows; line++) {
    walk.at = line * planeColumns + start;
    walk.walked = 0;
    walk.along = place.alongMm + line * alongStep[1] + start * alongStep[0];
    walk.column = line * columnStep[1] + start * columnStep[0];
    walk.row = line * rowStep[1] + start * rowStep[0];
    for (let below = lastAtOrBelow(layers, walk.along); walk.walked < planeColumns; below++)
      run(walk, below);
  }
}

/** Index of the last slice at or below a height; −1 below all. */
function lastAtOrBelow(layers: readonly Layer[], alongMm: number): number {
  let [low, high] = [-1, layers.length - 1];
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if ((layers[middle]?.alongMm ?? Infinity) <= alongMm) low = middle;
    else high = middle - 1;
  }
  return low;
}
