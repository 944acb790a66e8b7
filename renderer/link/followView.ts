import { add, dot, type SliceGrid, scale, subtract, type Vec3 } from '../../core/geometry/index.js';
import type { Link } from '../../core/note/index.js';
import { gridCentre } from '../plates/plateTransform.js';

/**
 * The middle of the other plate when one plate's middle is `centreMm`: the same place of the patient; or,
 * when positions can't be compared, the same distance in mm from the middle of the slice.
 */
export function followCentre(link: Link, from: SliceGrid, centreMm: Vec3, to: SliceGrid): Vec3 {
  if (link === 'position') return centreMm;
  const offset = subtract(centreMm, gridCentre(from));
  return add(
    gridCentre(to),
    add(
      scale(to.rowDirection, dot(offset, from.rowDirection)),
      scale(to.columnDirection, dot(offset, from.columnDirection)),
    ),
  );
}
