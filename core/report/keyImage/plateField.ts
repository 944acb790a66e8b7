import { add, patientToPixel, type SliceGrid, scale, type Vec3 } from '../../geometry/index.js';
import type { RasterPoint } from '../../raster/index.js';
import { type Shape, shapeCentre } from '../../region/index.js';

/** The piece of a slice that a key image shows: a square about a place, in the slice's own directions. */
export interface PlateField {
  readonly grid: SliceGrid;
  readonly centreMm: Vec3;
  readonly mmPerPx: number;
  /** The square on the picture: its left and top edge and its side, px. */
  readonly left: number;
  readonly top: number;
  readonly sidePx: number;
}

/** A field is at least this wide: a lumen is shown with the vessel's surroundings. */
const LEAST_FIELD_MM = 26;
/** And so many times as wide as the region. */
const FIELD_PER_REGION = 2.5;

/** How wide a square is shown about a region, mm. */
export function fieldMm(shape: Shape): number {
  const reach =
    shape.kind === 'ellipse'
      ? Math.max(...shape.radiiMm)
      : Math.max(...shape.pointsMm.map((point) => distance(point, shapeCentre(shape))));
  return Math.max(LEAST_FIELD_MM, 2 * FIELD_PER_REGION * reach);
}

/** Place on the slice, in pixel indices, of a pixel of the picture. */
export function pixelAt(field: PlateField, x: number, y: number): { column: number; row: number } {
  const { grid, mmPerPx, left, top, sidePx } = field;
  const centre = patientToPixel(grid, field.centreMm);
  const middle = (sidePx - 1) / 2;
  return {
    column: centre.column + ((x - left - middle) * mmPerPx) / grid.pixelSpacingMm[1],
    row: centre.row + ((y - top - middle) * mmPerPx) / grid.pixelSpacingMm[0],
  };
}

/** The border of a shape on the picture; an ellipse as a polygon that no eye tells from it. */
export function shapeOnField(shape: Shape, field: PlateField): readonly RasterPoint[] {
  return borderOf(shape, field.grid).map((point) => {
    const { grid, mmPerPx, left, top, sidePx } = field;
    const at = patientToPixel(grid, point);
    const centre = patientToPixel(grid, field.centreMm);
    const middle = (sidePx - 1) / 2;
    return {
      x: left + middle + ((at.column - centre.column) * grid.pixelSpacingMm[1]) / mmPerPx,
      y: top + middle + ((at.row - centre.row) * grid.pixelSpacingMm[0]) / mmPerPx,
    };
  });
}

const ELLIPSE_POINTS = 96;

function borderOf(shape: Shape, grid: SliceGrid): readonly Vec3[] {
  if (shape.kind === 'outline') return shape.pointsMm;
  const [u, v] = [shape.u ?? grid.rowDirection, shape.v ?? grid.columnDirection];
  return Array.from({ length: ELLIPSE_POINTS }, (_, index) => {
    const angle = (2 * Math.PI * index) / ELLIPSE_POINTS;
    const along = scale(u, shape.radiiMm[0] * Math.cos(angle));
    return add(shape.centreMm, add(along, scale(v, shape.radiiMm[1] * Math.sin(angle))));
  });
}

function distance(a: Vec3, b: Vec3): number {
  return Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);
}
