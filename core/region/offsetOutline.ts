import { add, cross, dot, normalise, scale, subtract, type Vec3 } from '../geometry/index.js';
import type { Outline } from './shape.js';

/** A sharp corner moves no further than this many times the distance of its sides. */
const MOST_MITRE = 2;

/**
 * The outline with each side moved outwards along its normal, mm; inwards where it is negative. Corners follow where
 * their sides meet again. Undefined where nothing is left: the outline is thinner than twice the distance, or has no
 * area.
 */
export function offsetOutline({ pointsMm }: Outline, byMm: number): Outline | undefined {
  const normal = areaVector(pointsMm);
  const axis = normalise(normal);
  if (axis === undefined) return undefined;
  // Corners that lie on each other have no side between them.
  const corners = pointsMm.filter(
    (point, index) => distanceSquared(point, pointsMm[(index + 1) % pointsMm.length]) > 1e-12,
  );
  const outward = corners.map((point, index) => {
    const next = corners[(index + 1) % corners.length] ?? point;
    return normalise(cross(subtract(next, point), axis)) ?? ([0, 0, 0] as const);
  });
  const moved = corners.map((point, index): Vec3 => {
    const before = outward[(index + corners.length - 1) % corners.length] ?? [0, 0, 0];
    const after = outward[index] ?? [0, 0, 0];
    const sum = add(before, after);
    // |n₁ + n₂|² = 2(1 + n₁·n₂), so the sides meet at d·(n₁ + n₂)/(1 + n₁·n₂).
    const mitre = Math.min(
      1 / Math.max(1e-9, 1 + dot(before, after)),
      MOST_MITRE / Math.max(1e-9, Math.sqrt(dot(sum, sum))),
    );
    return add(point, scale(sum, byMm * mitre));
  });
  // Drawn in too far, an outline turns inside out: across one way its area, across both its sides change their sign.
  const isLeft = dot(areaVector(moved), axis) > 0 && lengthAlong(moved, corners) > 0;
  return isLeft ? { kind: 'outline', pointsMm: moved } : undefined;
}

/** Length of the moved sides, each along the side that it was; what turned round counts below 0. */
function lengthAlong(moved: readonly Vec3[], before: readonly Vec3[]): number {
  return before.reduce((sum, point, index) => {
    const next = (index + 1) % before.length;
    const side = normalise(subtract(before[next] ?? point, point)) ?? ([0, 0, 0] as const);
    const [from, to] = [moved[index] ?? point, moved[next] ?? point];
    return sum + dot(subtract(to, from), side);
  }, 0);
}

/** Normal of a polygon with twice its area as length, by Newell's method. */
function areaVector(points: readonly Vec3[]): Vec3 {
  const origin = points[0] ?? [0, 0, 0];
  return points.reduce<Vec3>(
    (sum, point, index) =>
      add(
        sum,
        cross(
          subtract(point, origin),
          subtract(points[(index + 1) % points.length] ?? point, origin),
        ),
      ),
    [0, 0, 0],
  );
}

function distanceSquared(a: Vec3, b: Vec3 | undefined): number {
  const way = subtract(a, b ?? a);
  return dot(way, way);
}
