import {
  type PixelPoint,
  patientToPixel,
  pixelToPatient,
  type SliceGrid,
} from '../geometry/index.js';
import type { Ellipse, Outline, Shape } from './shape.js';

/** Pixel centres on the edge belong to the region; this much rounding is forgiven, relative to the radius or mm. */
const EDGE = 1e-9;

/** Pixels of a slice whose centres lie in a shape, edge included. */
export interface PixelsInside {
  /** Indices into the slice, row × columns + column, ascending. */
  readonly indices: Int32Array;
  /** The shape reaches over the border of the image. */
  readonly overBorder: boolean;
}

/** Which pixels of a slice a shape holds. The shape is projected on the slice along its normal. */
export function pixelsInside(shape: Shape, grid: SliceGrid): PixelsInside {
  return shape.kind === 'ellipse' ? insideEllipse(shape, grid) : insideOutline(shape, grid);
}

function insideEllipse(shape: Ellipse, grid: SliceGrid): PixelsInside {
  const u = shape.u ?? grid.rowDirection;
  const v = shape.v ?? grid.columnDirection;
  const [a, b] = shape.radiiMm;
  const centre = shape.centreMm;
  // Half extent of the ellipse along a direction d is √((a u·d)² + (b v·d)²).
  const reach = (d: readonly number[]): number =>
    Math.hypot(
      a * (u[0] * (d[0] ?? 0) + u[1] * (d[1] ?? 0) + u[2] * (d[2] ?? 0)),
      b * (v[0] * (d[0] ?? 0) + v[1] * (d[1] ?? 0) + v[2] * (d[2] ?? 0)),
    );
  const middle = patientToPixel(grid, centre);
  const box = clip(
    grid,
    middle.column - reach(grid.rowDirection) / grid.pixelSpacingMm[1],
    middle.column + reach(grid.rowDirection) / grid.pixelSpacingMm[1],
    middle.row - reach(grid.columnDirection) / grid.pixelSpacingMm[0],
    middle.row + reach(grid.columnDirection) / grid.pixelSpacingMm[0],
  );
  return collect(grid, box, (point) => {
    const p = pixelToPatient(grid, point);
    const x = p[0] - centre[0];
    const y = p[1] - centre[1];
    const z = p[2] - centre[2];
    const alongU = (x * u[0] + y * u[1] + z * u[2]) / a;
    const alongV = (x * v[0] + y * v[1] + z * v[2]) / b;
    return alongU * alongU + alongV * alongV <= 1 + EDGE;
  });
}

function insideOutline(shape: Outline, grid: SliceGrid): PixelsInside {
  const corners = shape.pointsMm.map((point) => patientToPixel(grid, point));
  const columns = corners.map((corner) => corner.column);
  const rows = corners.map((corner) => corner.row);
  const box = clip(
    grid,
    Math.min(...columns),
    Math.max(...columns),
    Math.min(...rows),
    Math.max(...rows),
  );
  return collect(grid, box, (point) => insidePolygon(point, corners));
}

interface Box {
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  readonly overBorder: boolean;
}

/** The whole pixels of a rectangle that are in the image. */
function clip(
  { rows, columns }: SliceGrid,
  left: number,
  right: number,
  top: number,
  bottom: number,
): Box {
  const slack = 1e-6;
  const whole = {
    left: Math.ceil(left - slack),
    right: Math.floor(right + slack),
    top: Math.ceil(top - slack),
    bottom: Math.floor(bottom + slack),
  };
  return {
    left: Math.max(0, whole.left),
    right: Math.min(columns - 1, whole.right),
    top: Math.max(0, whole.top),
    bottom: Math.min(rows - 1, whole.bottom),
    overBorder: left < -0.5 || right > columns - 0.5 || top < -0.5 || bottom > rows - 0.5,
  };
}

function collect(grid: SliceGrid, box: Box, inside: (point: PixelPoint) => boolean): PixelsInside {
  const indices: number[] = [];
  for (let row = box.top; row <= box.bottom; row++) {
    for (let column = box.left; column <= box.right; column++) {
      if (inside({ column, row })) indices.push(row * grid.columns + column);
    }
  }
  return { indices: Int32Array.from(indices), overBorder: box.overBorder };
}

/**
 * Point in polygon by crossings, even-odd, edge included. A self-crossing outline counts its overlaps as holes,
 * as the even-odd rule does.
 */
export function insidePolygon(point: PixelPoint, corners: readonly PixelPoint[]): boolean {
  let inside = false;
  for (let i = 0, j = corners.length - 1; i < corners.length; j = i++) {
    const a = corners[i];
    const b = corners[j];
    if (a === undefined || b === undefined) continue;
    if (onEdge(point, a, b)) return true;
    if (a.row > point.row !== b.row > point.row) {
      const at = ((b.column - a.column) * (point.row - a.row)) / (b.row - a.row) + a.column;
      if (point.column < at) inside = !inside;
    }
  }
  return inside;
}

function onEdge(point: PixelPoint, a: PixelPoint, b: PixelPoint): boolean {
  const dx = b.column - a.column;
  const dy = b.row - a.row;
  const lengthSquared = dx * dx + dy * dy;
  const x = point.column - a.column;
  const y = point.row - a.row;
  if (lengthSquared === 0) return Math.hypot(x, y) < EDGE;
  const along = (x * dx + y * dy) / lengthSquared;
  if (along < -EDGE || along > 1 + EDGE) return false;
  return Math.abs(x * dy - y * dx) <= EDGE * Math.max(1, Math.sqrt(lengthSquared));
}
