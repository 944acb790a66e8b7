import { add, distance, type Vec3 } from '../geometry/index.js';
import type { Ellipse, Shape } from './shape.js';

/** The shape moved by a vector, mm. */
export function moveShape(shape: Shape, byMm: Vec3): Shape {
  return shape.kind === 'ellipse'
    ? { ...shape, centreMm: add(shape.centreMm, byMm) }
    : { ...shape, pointsMm: shape.pointsMm.map((point) => add(point, byMm)) };
}

/** No region is drawn smaller than this, mm: it would hold no pixel and could not be grabbed. */
export const LEAST_RADIUS_MM = 0.1;

/** The ellipse with other half axes, mm, never below {@link LEAST_RADIUS_MM}. */
export function withRadii(shape: Ellipse, radiiMm: readonly [number, number]): Ellipse {
  return {
    ...shape,
    radiiMm: [Math.max(LEAST_RADIUS_MM, radiiMm[0]), Math.max(LEAST_RADIUS_MM, radiiMm[1])],
  };
}

/** The shape larger or smaller by a distance at its edge, mm, about its own centre. */
export function growShape(shape: Shape, byMm: number, centre: Vec3): Shape {
  if (shape.kind === 'ellipse') {
    return withRadii(shape, [shape.radiiMm[0] + byMm, shape.radiiMm[1] + byMm]);
  }
  return {
    ...shape,
    pointsMm: shape.pointsMm.map((point) => {
      const far = distance(point, centre);
      const factor = far > 0 ? Math.max(LEAST_RADIUS_MM, far + byMm) / far : 1;
      return [
        centre[0] + (point[0] - centre[0]) * factor,
        centre[1] + (point[1] - centre[1]) * factor,
        centre[2] + (point[2] - centre[2]) * factor,
      ];
    }),
  };
}
