import { dot, type SliceGrid } from '../geometry/index.js';
import { borderInPlane } from './nearEdgeDistance.js';
import type { Shape } from './shape.js';

/** Directions in which the width of an outline is taken, over half a turn: the smallest is found within 0.1 %. */
const DIRECTIONS = 60;

/**
 * The smallest width of a shape between two parallel lines, mm: twice the smaller half axis of an ellipse. A dent in
 * an outline is not seen.
 */
export function smallestWidthMm(shape: Shape, grid: SliceGrid): number {
  if (shape.kind === 'ellipse') return 2 * Math.min(...shape.radiiMm);
  const corners = borderInPlane(shape, grid);
  let smallest = Infinity;
  for (let direction = 0; direction < DIRECTIONS; direction++) {
    const angle = (Math.PI * direction) / DIRECTIONS;
    const axis = [Math.cos(angle), Math.sin(angle), 0] as const;
    const along = corners.map(([x, y]) => dot([x, y, 0], axis));
    smallest = Math.min(smallest, Math.max(...along) - Math.min(...along));
  }
  return smallest;
}
