import { add, cross, dot, length, subtract, type Vec3 } from '../geometry/index.js';
import type { Shape } from './shape.js';

/** Area of a shape, mm²: π a b of an ellipse, the shoelace sum of an outline in its plane. */
export function shapeArea(shape: Shape): number {
  if (shape.kind === 'ellipse') return Math.PI * shape.radiiMm[0] * shape.radiiMm[1];
  const origin = shape.pointsMm[0];
  if (origin === undefined) return 0;
  let twice: Vec3 = [0, 0, 0];
  shape.pointsMm.forEach((point, index) => {
    const next = shape.pointsMm[(index + 1) % shape.pointsMm.length] ?? point;
    twice = add(twice, cross(subtract(point, origin), subtract(next, origin)));
  });
  return length(twice) / 2;
}

/** Largest distance of a shape's edge from its centre, mm. */
export function shapeReach(shape: Shape, centre: Vec3): number {
  if (shape.kind === 'ellipse') return Math.max(...shape.radiiMm);
  return Math.max(
    ...shape.pointsMm.map((point) => {
      const offset = subtract(point, centre);
      return Math.sqrt(dot(offset, offset));
    }),
  );
}
