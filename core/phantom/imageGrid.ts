/** A square image in a slice: rows run along +x (to the left), columns along +y (to the back). */
export interface ImageGrid {
  readonly centreMm: readonly [number, number];
  readonly fieldOfViewMm: number;
  readonly matrix: number;
}

/** Distance between pixels, the same both ways. */
export function pixelMm(grid: ImageGrid): number {
  return grid.fieldOfViewMm / grid.matrix;
}

/** Centre of the first pixel. */
export function firstPixelMm(grid: ImageGrid): readonly [number, number] {
  const back = ((grid.matrix - 1) / 2) * pixelMm(grid);
  return [grid.centreMm[0] - back, grid.centreMm[1] - back];
}
