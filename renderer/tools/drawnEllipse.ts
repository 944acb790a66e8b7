import { pixelToPatient, type SliceGrid } from '../../core/geometry/index.js';
import { type Ellipse, LEAST_RADIUS_MM } from '../../core/region/index.js';
import type { PlatePoint } from '../plates/platePoint.js';
import { type PlateTransform, plateToPixel } from '../plates/plateTransform.js';

/**
 * The ellipse that fills the box from one corner to the other. `round` makes a circle of the larger half axis,
 * `fromMiddle` takes the first place as the middle.
 */
export function drawnEllipse(
  transform: PlateTransform,
  from: PlatePoint,
  to: PlatePoint,
  { round, fromMiddle }: { readonly round: boolean; readonly fromMiddle: boolean },
): Ellipse {
  const { grid } = transform;
  const a = plateToPixel(transform, from);
  const b = plateToPixel(transform, to);
  const reach = fromMiddle ? 1 : 0.5;
  const along = (b.column - a.column) * grid.pixelSpacingMm[1] * reach;
  const down = (b.row - a.row) * grid.pixelSpacingMm[0] * reach;
  const larger = Math.max(Math.abs(along), Math.abs(down));
  const radii = round ? ([larger, larger] as const) : ([Math.abs(along), Math.abs(down)] as const);
  const middle = fromMiddle
    ? a
    : {
        column: a.column + (Math.sign(along) * radii[0]) / grid.pixelSpacingMm[1],
        row: a.row + (Math.sign(down) * radii[1]) / grid.pixelSpacingMm[0],
      };
  return ellipseOn(grid, pixelToPatient(grid, middle), radii);
}

/** An ellipse on a slice's plane, its axes along the slice's rows and columns. */
export function ellipseOn(
  grid: SliceGrid,
  centreMm: Ellipse['centreMm'],
  radiiMm: readonly [number, number],
): Ellipse {
  return {
    kind: 'ellipse',
    centreMm,
    u: grid.rowDirection,
    v: grid.columnDirection,
    radiiMm: [Math.max(radiiMm[0], LEAST_RADIUS_MM), Math.max(radiiMm[1], LEAST_RADIUS_MM)],
  };
}
