import type { StackSlice } from '../stack/index.js';
import { borderInPlane } from './nearEdgeDistance.js';
import type { Shape } from './shape.js';

/** Whether a shape reaches over the border of a slice's pixels. */
export function reachesOver(shape: Shape, { image: { grid } }: StackSlice): boolean {
  const [downMm, acrossMm] = grid.pixelSpacingMm;
  return borderInPlane(shape, grid).some(
    ([x, y]) =>
      x < -acrossMm / 2 ||
      y < -downMm / 2 ||
      x > (grid.columns - 0.5) * acrossMm ||
      y > (grid.rows - 0.5) * downMm,
  );
}
