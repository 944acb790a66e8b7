import { add, normalise, scale, type Vec3 } from '../../geometry/index.js';
import type { Shape } from '../../region/index.js';
import { dcm } from './code.js';
import { type ContentItem, contentItem, type ImageReference, imageItem } from './contentItem.js';

/** A point in an image: column and row in pixel indices, 0 at the centre of the first. */
export type PixelPlace = readonly [column: number, row: number];

/** A graphic of the Spatial Coordinates Macro, its places in pixel indices. */
export interface Graphic {
  readonly type: 'ELLIPSE' | 'POLYLINE';
  readonly places: readonly PixelPlace[];
}

/**
 * Spatial coordinates have 0\0 at the outer corner of the first pixel, so that its centre is 0.5\0.5 (PS3.3 C.18.6.1;
 * from memory, and the documentation of highdicom's ImageToReferenceTransformer says the same of SCOORD).
 */
const CENTRE_OF_FIRST = 0.5;

/** Points of a polygon in place of an ellipse; it lies within 0.13 % of the half axis. */
const POLYGON_POINTS = 90;

/** Two axes count as perpendicular in the pixels when the cosine between them is below this. */
const PERPENDICULAR = 1e-6;

/** The image region of a shape (111030 DCM), selected from its image. */
export function imageRegionItem(graphic: Graphic, image: ImageReference): ContentItem {
  const data = graphic.places.flatMap(([column, row]) => [
    column + CENTRE_OF_FIRST,
    row + CENTRE_OF_FIRST,
  ]);
  return contentItem(
    { relationship: 'CONTAINS', type: 'SCOORD', name: dcm('111030', 'Image Region') },
    [
      { tag: 0x00700022, vr: 'FL', value: data },
      { tag: 0x00700023, vr: 'CS', value: graphic.type },
    ],
    [imageItem('SELECTED FROM', undefined, image)],
  );
}

/**
 * A shape in the pixels of an image: an ellipse as the end points of its longer and then of its shorter axis, an
 * outline as a polyline that ends where it begins (PS3.3 C.18.6.1.2). Where pixels are not square, the axes of a
 * turned ellipse are not perpendicular in them, and readers would differ: it becomes a polyline. Undefined when
 * `pixelOf` has no answer.
 */
export function graphicOf(
  shape: Shape,
  pixelOf: (pointMm: Vec3) => PixelPlace | undefined,
): Graphic | undefined {
  if (shape.kind === 'outline') return closed(shape.pointsMm, pixelOf);
  const { centreMm, radiiMm } = shape;
  const centre = pixelOf(centreMm);
  if (centre === undefined) return undefined;
  const u = shape.u ?? imageDirection(centreMm, centre, pixelOf, 0);
  const v = shape.v ?? imageDirection(centreMm, centre, pixelOf, 1);
  if (u === undefined || v === undefined) return undefined;
  const at = (a: number, b: number): Vec3 =>
    add(add(centreMm, scale(u, a * radiiMm[0])), scale(v, b * radiiMm[1]));
  const ends = allOf([at(-1, 0), at(1, 0), at(0, -1), at(0, 1)], pixelOf);
  if (ends === undefined) return undefined;
  const [u0, u1, v0, v1] = ends as [PixelPlace, PixelPlace, PixelPlace, PixelPlace];
  const [lengthU, lengthV] = [distance(u0, u1), distance(v0, v1)];
  const cosine =
    ((u1[0] - u0[0]) * (v1[0] - v0[0]) + (u1[1] - u0[1]) * (v1[1] - v0[1])) / (lengthU * lengthV);
  if (Math.abs(cosine) > PERPENDICULAR) {
    const turn = Array.from(
      { length: POLYGON_POINTS },
      (_, i) => (2 * Math.PI * i) / POLYGON_POINTS,
    );
    return closed(
      turn.map((angle) => at(Math.cos(angle), Math.sin(angle))),
      pixelOf,
    );
  }
  return { type: 'ELLIPSE', places: lengthU >= lengthV ? [u0, u1, v0, v1] : [v0, v1, u0, u1] };
}

function closed(
  pointsMm: readonly Vec3[],
  pixelOf: (pointMm: Vec3) => PixelPlace | undefined,
): Graphic | undefined {
  const places = allOf(pointsMm, pixelOf);
  const first = places?.[0];
  if (places === undefined || first === undefined) return undefined;
  return { type: 'POLYLINE', places: [...places, first] };
}

/**
 * The direction along which the column (0) or row (1) of the image grows: the gradient of that index over the patient's
 * axes. An ellipse without axes of its own has those of the image that it was measured on.
 */
function imageDirection(
  pointMm: Vec3,
  place: PixelPlace,
  pixelOf: (pointMm: Vec3) => PixelPlace | undefined,
  index: 0 | 1,
): Vec3 | undefined {
  const steps = allOf(
    [add(pointMm, [1, 0, 0]), add(pointMm, [0, 1, 0]), add(pointMm, [0, 0, 1])],
    pixelOf,
  );
  if (steps === undefined) return undefined;
  const [x, y, z] = steps.map((step) => step[index] - place[index]) as [number, number, number];
  return normalise([x, y, z]);
}

function allOf(
  pointsMm: readonly Vec3[],
  pixelOf: (pointMm: Vec3) => PixelPlace | undefined,
): readonly PixelPlace[] | undefined {
  const places = pointsMm.map(pixelOf);
  return places.every((place) => place !== undefined) ? places : undefined;
}

function distance([a, b]: PixelPlace, [c, d]: PixelPlace): number {
  return Math.hypot(a - c, b - d);
}
