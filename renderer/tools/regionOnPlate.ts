import { add, scale, type Vec3 } from '../../core/geometry/index.js';
import type { Ellipse, Outline, Shape } from '../../core/region/index.js';
import type { PlatePoint } from '../plates/platePoint.js';
import { type PlateTransform, patientToPlate } from '../plates/plateTransform.js';

/** An ellipse as it lies on a plate: two half axes as vectors, so that any direction can be drawn. */
export interface EllipseOnPlate {
  readonly kind: 'ellipse';
  readonly centre: PlatePoint;
  readonly u: PlatePoint;
  readonly v: PlatePoint;
}

export interface OutlineOnPlate {
  readonly kind: 'outline';
  readonly points: readonly PlatePoint[];
}

export type ShapeOnPlate = EllipseOnPlate | OutlineOnPlate;

/** The unit axes of an ellipse; where it has none of its own, those of the slice. */
export function ellipseAxes(shape: Ellipse, { grid }: PlateTransform): readonly [Vec3, Vec3] {
  return [shape.u ?? grid.rowDirection, shape.v ?? grid.columnDirection];
}

/** Lays a shape on a plate, projected along the slice's normal. */
export function shapeOnPlate(shape: Shape, transform: PlateTransform): ShapeOnPlate {
  if (shape.kind === 'outline') return outlineOnPlate(shape, transform);
  const centre = patientToPlate(transform, shape.centreMm);
  const [u, v] = ellipseAxes(shape, transform).map((axis, index) => {
    const end = add(shape.centreMm, scale(axis, shape.radiiMm[index] ?? 0));
    const { x, y } = patientToPlate(transform, end);
    return { x: x - centre.x, y: y - centre.y };
  });
  return { kind: 'ellipse', centre, u: u ?? centre, v: v ?? centre };
}

function outlineOnPlate({ pointsMm }: Outline, transform: PlateTransform): OutlineOnPlate {
  return { kind: 'outline', points: pointsMm.map((point) => patientToPlate(transform, point)) };
}

/** Where a shape can be taken hold of to change its size: the ends of an ellipse's axes, an outline's points. */
export function handlesOf(shape: ShapeOnPlate): readonly PlatePoint[] {
  if (shape.kind === 'outline')
    return shape.points.length <= MOST_POINT_HANDLES ? shape.points : [];
  const { centre, u, v } = shape;
  return [
    { x: centre.x + u.x, y: centre.y + u.y },
    { x: centre.x + v.x, y: centre.y + v.y },
    { x: centre.x - u.x, y: centre.y - u.y },
    { x: centre.x - v.x, y: centre.y - v.y },
  ];
}

/** An outline of more points than this was traced; its handles would hide it. */
const MOST_POINT_HANDLES = 40;
