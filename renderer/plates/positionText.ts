import { formatQuantity } from '../../core/format/index.js';
import { gridNormal, type SliceGrid } from '../../core/geometry/index.js';

/** A normal within this cosine of a patient axis is that axis: half a degree. */
const ALONG_AXIS = Math.cos(Math.PI / 360);

/**
 * The position of a slice for people: with the axis's letter where the slices are stacked along x, y or z of the
 * patient, and then that coordinate itself; else the position along their normal.
 */
export function positionText(grid: SliceGrid, alongMm: number): string {
  const normal = gridNormal(grid);
  const axis = normal.findIndex((cosine) => Math.abs(cosine) >= ALONG_AXIS);
  const letter = ['x', 'y', 'z'][axis];
  if (letter === undefined) return `${formatQuantity(alongMm, 'positionMm')} mm along the stack`;
  const coordinate = (normal[axis] ?? 1) < 0 ? -alongMm : alongMm;
  return `${letter} ${formatQuantity(coordinate, 'positionMm')} mm`;
}
