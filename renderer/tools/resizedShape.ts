import { dot, subtract, type Vec3 } from '../../core/geometry/index.js';
import { type Shape, withRadii } from '../../core/region/index.js';
import type { PlateTransform } from '../plates/plateTransform.js';
import { ellipseAxes } from './regionOnPlate.js';

/**
 * A shape after one of its handles was dragged to a place: an ellipse keeps its middle and takes the distance as
 * that half axis, or as both when it is to stay round; an outline's point goes there.
 */
export function resizedShape(
  shape: Shape,
  handle: number,
  toMm: Vec3,
  round: boolean,
  transform: PlateTransform,
): Shape {
  if (shape.kind === 'outline') {
    return {
      ...shape,
      pointsMm: shape.pointsMm.map((point, index) => (index === handle ? toMm : point)),
    };
  }
  const axes = ellipseAxes(shape, transform);
  const axis = handle % 2 === 0 ? axes[0] : axes[1];
  const radius = Math.abs(dot(subtract(toMm, shape.centreMm), axis));
  if (round) return withRadii(shape, [radius, radius]);
  return withRadii(
    shape,
    handle % 2 === 0 ? [radius, shape.radiiMm[1]] : [shape.radiiMm[0], radius],
  );
}
