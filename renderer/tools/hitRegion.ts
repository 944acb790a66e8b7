import type { PlatePoint } from '../plates/platePoint.js';
import { distanceToSegment } from './outlinePoints.js';
import { type EllipseOnPlate, handlesOf, type ShapeOnPlate } from './regionOnPlate.js';

/** What of a shape lies under the pointer. */
export type Hit =
  | { readonly part: 'handle'; readonly index: number }
  | { readonly part: 'edge' }
  | { readonly part: 'inside' };

const HANDLE_PX = 7;
const EDGE_PX = 5;

/**
 * What of a shape a place on the plate hits: a handle before the edge before the inside; undefined beside it.
 * On a shape so small that its handles meet, a place nearer to the middle than to a handle is the inside.
 */
export function hitShape(
  shape: ShapeOnPlate,
  point: PlatePoint,
  withHandles: boolean,
): Hit | undefined {
  const inside = isInside(shape, point);
  if (withHandles) {
    const index = nearestHandle(handlesOf(shape), point);
    if (index !== undefined && !(inside && isNearMiddle(shape, point))) {
      return { part: 'handle', index };
    }
  }
  if (edgeDistance(shape, point) <= EDGE_PX && !(inside && isNearMiddle(shape, point))) {
    return { part: 'edge' };
  }
  return inside ? { part: 'inside' } : undefined;
}

function nearestHandle(handles: readonly PlatePoint[], point: PlatePoint): number | undefined {
  let nearest: number | undefined;
  let least = HANDLE_PX;
  handles.forEach((handle, index) => {
    const away = Math.hypot(handle.x - point.x, handle.y - point.y);
    if (away <= least) [least, nearest] = [away, index];
  });
  return nearest;
}

function isNearMiddle(shape: ShapeOnPlate, point: PlatePoint): boolean {
  if (shape.kind === 'outline') return false;
  const [s, t] = ellipseCoordinates(shape, point);
  return Math.hypot(s, t) < 0.5;
}

/** A place in units of the half axes: on the ellipse's edge its length is 1. */
function ellipseCoordinates(
  { centre, u, v }: EllipseOnPlate,
  { x, y }: PlatePoint,
): [number, number] {
  const [dx, dy] = [x - centre.x, y - centre.y];
  const determinant = u.x * v.y - u.y * v.x;
  if (determinant === 0) return [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  return [(dx * v.y - dy * v.x) / determinant, (u.x * dy - u.y * dx) / determinant];
}

function isInside(shape: ShapeOnPlate, point: PlatePoint): boolean {
  if (shape.kind === 'ellipse') return Math.hypot(...ellipseCoordinates(shape, point)) <= 1;
  let inside = false;
  shape.points.forEach((a, index) => {
    const b = shape.points[(index + 1) % shape.points.length] ?? a;
    const crosses = a.y > point.y !== b.y > point.y;
    if (crosses && point.x < a.x + ((point.y - a.y) / (b.y - a.y)) * (b.x - a.x)) inside = !inside;
  });
  return inside;
}

/** Distance to the edge, CSS pixels; for an ellipse along the ray from its middle, which is close enough to grab it. */
function edgeDistance(shape: ShapeOnPlate, point: PlatePoint): number {
  if (shape.kind === 'outline') {
    return Math.min(
      ...shape.points.map((from, index) =>
        distanceToSegment(point, from, shape.points[(index + 1) % shape.points.length]),
      ),
    );
  }
  const far = Math.hypot(point.x - shape.centre.x, point.y - shape.centre.y);
  const relative = Math.hypot(...ellipseCoordinates(shape, point));
  return relative === 0 ? Number.POSITIVE_INFINITY : Math.abs(far - far / relative);
}
