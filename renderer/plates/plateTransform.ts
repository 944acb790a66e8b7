import {
  type PixelPoint,
  patientToPixel,
  pixelToPatient,
  type SliceGrid,
  type Vec3,
} from '../../core/geometry/index.js';
import type { PlateSize } from '../state/appState.js';
import type { PlatePoint } from './platePoint.js';

/** How a slice lies on a plate. Everything that points at the image goes through this one transform. */
export interface PlateTransform {
  readonly grid: SliceGrid;
  readonly size: PlateSize;
  /** The pixel indices in the middle of the plate. */
  readonly centre: PixelPoint;
  readonly pxPerColumn: number;
  readonly pxPerRow: number;
}

/** Lays a slice on a plate: `centreMm` in its middle, `scalePxPerMm` CSS pixels to the mm. */
export function plateTransform(
  grid: SliceGrid,
  size: PlateSize,
  centreMm: Vec3,
  scalePxPerMm: number,
): PlateTransform {
  return {
    grid,
    size,
    centre: patientToPixel(grid, centreMm),
    pxPerColumn: scalePxPerMm * grid.pixelSpacingMm[1],
    pxPerRow: scalePxPerMm * grid.pixelSpacingMm[0],
  };
}

export function pixelToPlate(transform: PlateTransform, pixel: PixelPoint): PlatePoint {
  return {
    x:
      transform.size.widthPx / 2 + (pixel.column - transform.centre.column) * transform.pxPerColumn,
    y: transform.size.heightPx / 2 + (pixel.row - transform.centre.row) * transform.pxPerRow,
  };
}

export function plateToPixel(transform: PlateTransform, point: PlatePoint): PixelPoint {
  return {
    column:
      transform.centre.column + (point.x - transform.size.widthPx / 2) / transform.pxPerColumn,
    row: transform.centre.row + (point.y - transform.size.heightPx / 2) / transform.pxPerRow,
  };
}

export function patientToPlate(transform: PlateTransform, pointMm: Vec3): PlatePoint {
  return pixelToPlate(transform, patientToPixel(transform.grid, pointMm));
}

export function plateToPatient(transform: PlateTransform, point: PlatePoint): Vec3 {
  return pixelToPatient(transform.grid, plateToPixel(transform, point));
}

/** The scale at which the whole slice just fits on a plate, CSS pixels per mm; undefined for a plate without size. */
export function fitScale(grid: SliceGrid, size: PlateSize): number | undefined {
  const widthMm = grid.columns * grid.pixelSpacingMm[1];
  const heightMm = grid.rows * grid.pixelSpacingMm[0];
  const scale = Math.min(size.widthPx / widthMm, size.heightPx / heightMm);
  return scale > 0 ? scale : undefined;
}

/** The middle of a slice in patient space: between its first and last pixel centres. */
export function gridCentre(grid: SliceGrid): Vec3 {
  return pixelToPatient(grid, { column: (grid.columns - 1) / 2, row: (grid.rows - 1) / 2 });
}
