import { dot, patientToPixel, type SliceGrid } from '../geometry/index.js';
import type { Shape } from './shape.js';

/** A place in the plane of a slice, mm along its rows and its columns from the first pixel. */
export type PlaneMm = readonly [number, number];

/** Sides of the polygon that stands for an ellipse: it lies within 0.3 % of the radius. */
const SIDES = 40;

/** The border of a shape in the plane of a slice: a closed polygon. */
export function borderInPlane(shape: Shape, grid: SliceGrid): readonly PlaneMm[] {
  const inPlane = (point: Parameters<typeof patientToPixel>[1]): PlaneMm => {
    const { column, row } = patientToPixel(grid, point);
    return [column * grid.pixelSpacingMm[1], row * grid.pixelSpacingMm[0]];
  };
  if (shape.kind === 'outline') return shape.pointsMm.map(inPlane);
  const [x, y] = inPlane(shape.centreMm);
  const u = shape.u ?? grid.rowDirection;
  const v = shape.v ?? grid.columnDirection;
  const [a, b] = shape.radiiMm;
  return Array.from({ length: SIDES }, (_, side): PlaneMm => {
    const angle = (2 * Math.PI * side) / SIDES;
    const [alongU, alongV] = [a * Math.cos(angle), b * Math.sin(angle)];
    return [
      x + alongU * dot(u, grid.rowDirection) + alongV * dot(v, grid.rowDirection),
      y + alongU * dot(u, grid.columnDirection) + alongV * dot(v, grid.columnDirection),
    ];
  });
}

/** Distance of a place from a closed polygon, mm: 0 inside. */
export function distanceFrom(border: readonly PlaneMm[], [x, y]: PlaneMm): number {
  let isInside = false;
  let nearest = Infinity;
  for (let i = 0, j = border.length - 1; i < border.length; j = i++) {
    const [ax, ay] = border[j] as PlaneMm;
    const [bx, by] = border[i] as PlaneMm;
    const [dx, dy] = [bx - ax, by - ay];
    const squared = dx * dx + dy * dy;
    const part =
      squared > 0 ? Math.max(0, Math.min(1, ((x - ax) * dx + (y - ay) * dy) / squared)) : 0;
    nearest = Math.min(nearest, (x - ax - part * dx) ** 2 + (y - ay - part * dy) ** 2);
    if (ay > y !== by > y && x < ax + ((y - ay) / dy) * dx) isInside = !isInside;
  }
  return isInside ? 0 : Math.sqrt(nearest);
}
