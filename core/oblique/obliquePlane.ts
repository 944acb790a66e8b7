import {
  add,
  distance,
  dot,
  gridNormal,
  normalise,
  patientToPixel,
  pixelToPatient,
  type SliceGrid,
  scale,
  subtract,
  type Vec3,
} from '../geometry/index.js';
import { type Result, refuse, success } from '../result.js';

/** Two points on the course of a vessel, patient space, mm. */
export type Course = readonly [Vec3, Vec3];

/** How large the plane is, how fine, and from which side it is seen. */
export interface ObliquePlaneOptions {
  /** Pixels; 512 by 512 where nothing is said. */
  readonly rows?: number;
  readonly columns?: number;
  /** Distance between pixels both ways, mm; the finest pixel spacing of the slices given where nothing is said. */
  readonly spacingMm?: number;
  /**
   * The plane's normal is taken to this side. The normal of the first slice where nothing is said: the cut is seen from
   * where the slices are seen from. While a course is dragged, give the last plane's normal, so that the picture does not
   * turn over as the course passes the plane of the slices.
   */
  readonly sideOf?: Vec3;
}

/** Nearer than this two points tell no direction, mm. */
const LEAST_COURSE_MM = 1e-3;
/** Cosine above which a course runs along the normal of the slices: 0.08°, what points of a thousandth of a mm tell over a mm. */
const ALONG_NORMAL = 1 - 1e-6;
/** A course as square to a direction as this is told by the order of its points. */
const SQUARE = 1e-9;
/** Spacings that differ by less are one, mm. */
const SAME_SPACING_MM = 1e-4;
const SIDE_PX = 512;

/**
 * The plane across a vessel: perpendicular to the line through two points on its course, through their middle or another
 * point, which is the centre of the pixel [rows >> 1, columns >> 1]. It is one grid in patient space, for both stacks.
 *
 * Rows and columns are the slice's own, carried over by the smallest rotation that takes the slice's normal to the
 * plane's: of all directions in the plane these are the nearest to the slice's, row and column counted alike, and they
 * change smoothly with the course. A course along the normal gives the slice's own directions, and where the spacing is
 * a slice's too, the pixels are laid on those of that slice (at most half a pixel from the point).
 *
 * @param slices a slice grid of each stack; the directions are the first one's
 * @returns refused for points that tell no direction, and for slices without pixel spacing
 */
export function obliquePlane(
  [from, to]: Course,
  slices: readonly [SliceGrid, ...SliceGrid[]],
  throughMm: Vec3 = scale(add(from, to), 0.5),
  options: ObliquePlaneOptions = {},
): Result<SliceGrid> {
  const { rows = SIDE_PX, columns = SIDE_PX, sideOf = gridNormal(slices[0]) } = options;
  if (!Number.isInteger(rows) || rows < 2) throw new RangeError(`invalid rows: ${rows}`);
  if (!Number.isInteger(columns) || columns < 2)
    throw new RangeError(`invalid columns: ${columns}`);
  if (slices.some(({ unscaled }) => unscaled === true))
    return refuse('no-pixel-spacing', 'The files have no pixel spacing: no oblique cut.');
  const finestMm = Math.min(...slices.flatMap(({ pixelSpacingMm }) => pixelSpacingMm));
  const { spacingMm = finestMm } = options;
  if (!(spacingMm > 0 && spacingMm < Infinity))
    throw new RangeError(`invalid spacing: ${spacingMm}`);
  const course = normalise(subtract(to, from));
  if (course === undefined || !(distance(from, to) >= LEAST_COURSE_MM))
    return refuse(
      'no-course',
      'The two points lie on one another and tell no direction: set them farther apart on the vessel.',
    );
  const normal = dot(course, sideOf) < -SQUARE ? scale(course, -1) : course;
  const turned = directionsOn(slices[0], normal);
  const spacing = [spacingMm, spacingMm] as const;
  const corner = add(
    scale(turned.rowDirection, -(columns >> 1) * spacingMm),
    scale(turned.columnDirection, -(rows >> 1) * spacingMm),
  );
  const centreMm = onLattice(slices, normal, spacingMm, throughMm);
  return success({
    ...turned,
    positionMm: add(centreMm, corner),
    pixelSpacingMm: spacing,
    rows,
    columns,
  });
}

/** Angle between an oblique plane and the slices, degrees, 0 to 90. */
export function angleToSlicesDeg(plane: SliceGrid, slice: SliceGrid): number {
  const cosine = Math.min(1, Math.abs(dot(gridNormal(plane), gridNormal(slice))));
  return (Math.acos(cosine) * 180) / Math.PI;
}

/** Rodrigues' rotation of the slice's directions by the smallest angle that takes its normal to another. */
function directionsOn(
  slice: SliceGrid,
  normal: Vec3,
): Pick<SliceGrid, 'rowDirection' | 'columnDirection'> {
  const { rowDirection, columnDirection } = slice;
  const own = gridNormal(slice);
  const cosine = dot(own, normal);
  if (cosine > ALONG_NORMAL) return { rowDirection, columnDirection };
  // Seen from behind there is no smallest rotation: the columns stay, as when a page is turned.
  if (cosine < -ALONG_NORMAL) return { rowDirection: scale(rowDirection, -1), columnDirection };
  const both = add(own, normal);
  const turn = (direction: Vec3): Vec3 =>
    subtract(direction, scale(both, dot(normal, direction) / (1 + cosine)));
  return { rowDirection: turn(rowDirection), columnDirection: turn(columnDirection) };
}

/** The pixel of a slice of this spacing that is next to a point, at the point's height, when the plane is a slice's own. */
function onLattice(
  slices: readonly SliceGrid[],
  normal: Vec3,
  spacingMm: number,
  point: Vec3,
): Vec3 {
  const [first] = slices;
  const own = slices.find(
    (grid) =>
      grid.pixelSpacingMm.every((one) => Math.abs(one - spacingMm) < SAME_SPACING_MM) &&
      Math.abs(dot(gridNormal(grid), normal)) > ALONG_NORMAL &&
      first !== undefined &&
      dot(grid.rowDirection, first.rowDirection) > ALONG_NORMAL,
  );
  if (own === undefined) return point;
  const { column, row } = patientToPixel(own, point);
  const pixelMm = pixelToPatient(own, { column: Math.round(column), row: Math.round(row) });
  const heightMm = dot(subtract(point, pixelMm), gridNormal(own));
  return add(pixelMm, scale(gridNormal(own), heightMm));
}
