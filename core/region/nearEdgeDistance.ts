import { dot, patientToPixel, type SliceGrid } from '../geometry/index.js';
import type { Shape } from './shape.js';

/** A place in the plane of a slice, mm along its rows and its columns from the first pixel. */
export type PlaneMm = readonly [number, number];

/** Corners of a circle of 40 sides: as an ellipse it lies within 0.3 % of the radius. */
const CORNERS: readonly PlaneMm[] = Array.from({ length: 40 }, (_, side) => {
  const angle = (2 * Math.PI * side) / 40;
  return [Math.cos(angle), Math.sin(angle)];
});

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
  const [uAcross, uDown] = [a * dot(u, grid.rowDirection), a * dot(u, grid.columnDirection)];
  const [vAcross, vDown] = [b * dot(v, grid.rowDirection), b * dot(v, grid.columnDirection)];
  return CORNERS.map(([c, s]) => [x + c * uAcross + s * vAcross, y + c * uDown + s * vDown]);
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
