import {
  add,
  cross,
  dot,
  normalise,
  type SliceGrid,
  scale,
  subtract,
  type Vec3,
} from '../geometry/index.js';
import { type Result, refuse, success } from '../result.js';
import type { Shape } from './shape.js';

/** A shape may lean from the slice's plane by this much: cosines of real headers are rounded. */
const PARALLEL_COSINE = 1 - 1e-5;

/** Outline points may leave their common plane by this much, mm. */
const FLAT_MM = 1e-2;

/** A point of the shape's plane: the centre of an ellipse, the mean of an outline's points. */
export function shapeCentre(shape: Shape): Vec3 {
  if (shape.kind === 'ellipse') return shape.centreMm;
  const sum = shape.pointsMm.reduce<Vec3>((total, point) => add(total, point), [0, 0, 0]);
  return scale(sum, 1 / shape.pointsMm.length);
}

/**
 * Checks that a shape lies in planes parallel to a slice. An ellipse without axes of its own always does.
 *
 * @returns refused when the shape has no plane, or leans against the slice
 */
export function checkParallel(shape: Shape, grid: SliceGrid): Result<undefined> {
  const sliceNormal = cross(grid.rowDirection, grid.columnDirection);
  if (shape.kind === 'ellipse') {
    if (shape.u === undefined && shape.v === undefined) return success(undefined);
    const normal = normalise(cross(shape.u ?? grid.rowDirection, shape.v ?? grid.columnDirection));
    if (normal === undefined) return refuse('no-plane', 'The axes of the ellipse span no plane.');
    return parallel(normal, sliceNormal);
  }
  const normal = outlineNormal(shape.pointsMm);
  if (normal === undefined) return refuse('no-plane', 'The points of the outline span no plane.');
  const centre = shapeCentre(shape);
  const bent = shape.pointsMm.some((p) => Math.abs(dot(subtract(p, centre), normal)) > FLAT_MM);
  if (bent) return refuse('not-flat', 'The points of the outline do not lie in one plane.');
  return parallel(normal, sliceNormal);
}

function parallel(normal: Vec3, sliceNormal: Vec3): Result<undefined> {
  return Math.abs(dot(normal, sliceNormal)) >= PARALLEL_COSINE
    ? success(undefined)
    : refuse('not-parallel', 'The region leans against the slices of this stack: not measured.');
}

/** Unit normal of a polygon by Newell's method (Tampieri 1992): robust for points that are nearly in line. */
function outlineNormal(points: readonly Vec3[]): Vec3 | undefined {
  let normal: Vec3 = [0, 0, 0];
  const origin = points[0] ?? [0, 0, 0];
  points.forEach((point, index) => {
    const next = points[(index + 1) % points.length] ?? point;
    normal = add(normal, cross(subtract(point, origin), subtract(next, origin)));
  });
  return normalise(normal);
}
