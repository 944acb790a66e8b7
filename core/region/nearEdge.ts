import type { StoredValues } from '../dicom/index.js';
import type { SliceGrid } from '../geometry/index.js';
import type { StackSlice } from '../stack/index.js';
import { borderInPlane, distanceFrom, type PlaneMm } from './nearEdgeDistance.js';
import type { EdgeLevels } from './nearEdgeLevels.js';
import { type EdgeKind, type Structure, soughtBy, structuresIn } from './nearEdgeStructures.js';
import { type EdgeWindow, edgeWindow, type PixelBounds } from './nearEdgeWindow.js';
import type { Shape } from './shape.js';

/** A strong edge close to a region, or inside it. */
export interface NearEdge {
  readonly kind: EdgeKind;
  /** From the region's border to the nearest place of the edge, mm; 0 where the edge lies inside. */
  readonly distanceMm: number;
  /** Pixels of the structure, indices into the slice, ascending. */
  readonly pixels: Int32Array;
}

/**
 * The contour of a structure is known to this share of the blur, from both sides: a thin strut's contour lies half a
 * blur before it, noise and pixels move either.
 */
const UNCERTAIN = 0.45;
/** The contour is followed so far beyond a structure's pixels. */
const MOST_BEYOND_BLURS = 0.5;
/** The window goes on beyond what may be near, so that a strut shows its shape, in blurs and mm. */
const BEYOND_BLURS = 1;
const BEYOND_MM = 2;

/**
 * Strong edges (struts, calcium, air) that lie within a blur of a region on one slice, measured from the region's
 * border outwards, or inside it; the nearest first. A strong edge is the contour, in the image as the kernel shows it,
 * half way between a structure that is brighter than enhanced lumen, or air, and what the region measures. The edge of
 * lumen to wall or fat is none.
 *
 * @param withinMm how far counts as near: the blur of the kernel that the region is measured on
 * @param levels of the slice's own kernel
 * @param regionHu median of the region on this slice
 */
export function nearEdges(
  shape: Shape,
  slice: StackSlice,
  stored: StoredValues,
  levels: EdgeLevels,
  withinMm: number,
  regionHu: number,
): readonly NearEdge[] {
  const { grid } = slice.image;
  const spacingMm = [grid.pixelSpacingMm[1], grid.pixelSpacingMm[0]] as const;
  const border = borderInPlane(shape, grid);
  const reachMm = (1 + UNCERTAIN) * withinMm;
  const bounds = boundsAround(border, reachMm + BEYOND_BLURS * levels.blurMm + BEYOND_MM, grid);
  const sought = soughtBy(levels, regionHu);
  const window = edgeWindow(slice, stored, bounds, levels.smoothingMm, regionHu, sought);
  if (window === undefined) return [];
  return structuresIn(window, spacingMm, levels, regionHu)
    .flatMap((structure): NearEdge[] => {
      const distanceMm = distanceTo(structure, window, border, spacingMm, levels.blurMm);
      if (distanceMm > reachMm) return [];
      return [{ kind: structure.kind, distanceMm, pixels: inSlice(structure, window, grid) }];
    })
    .sort((a, b) => a.distanceMm - b.distanceMm);
}

function boundsAround(
  border: readonly PlaneMm[],
  marginMm: number,
  { pixelSpacingMm: [downMm, acrossMm], columns, rows }: SliceGrid,
): PixelBounds {
  let [left, right, top, bottom] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const [x, y] of border) {
    left = Math.min(left, x);
    right = Math.max(right, x);
    top = Math.min(top, y);
    bottom = Math.max(bottom, y);
  }
  return {
    left: Math.max(0, Math.floor((left - marginMm) / acrossMm)),
    right: Math.min(columns - 1, Math.ceil((right + marginMm) / acrossMm)),
    top: Math.max(0, Math.floor((top - marginMm) / downMm)),
    bottom: Math.min(rows - 1, Math.ceil((bottom + marginMm) / downMm)),
  };
}

/**
 * Distance of the structure's contour from the region: the contour is found between pixels along rows and columns. It
 * may lie a little beyond the pixels that are told from lumen, where a structure borders on something dark.
 */
function distanceTo(
  { kind, pixels, levelHu, behindBlurs }: Structure,
  { column: left, row: top, columns, rows, hu }: EdgeWindow,
  border: readonly PlaneMm[],
  spacingMm: readonly [number, number],
  blurMm: number,
): number {
  const [acrossMm, downMm] = spacingMm;
  const held = new Set(pixels);
  let nearest = Infinity;
  pixels.forEach((at, index) => {
    const [row, column] = [Math.floor(at / columns), at % columns];
    const level = levelHu[index] as number;
    for (const [dx, dy] of SIDEWAYS) {
      const steps = Math.max(
        1,
        Math.round((MOST_BEYOND_BLURS * blurMm) / (dx === 0 ? downMm : acrossMm)),
      );
      let value = hu[at] as number;
      for (let step = 1; step <= steps; step++) {
        const [c, r] = [column + dx * step, row + dy * step];
        const other = r * columns + c;
        if (c < 0 || r < 0 || c >= columns || r >= rows || held.has(other)) break;
        const beyond = hu[other] as number;
        const isCrossed = kind === 'air' ? beyond >= level : beyond <= level;
        if (isCrossed || step === steps) {
          const share = isCrossed ? step - 1 + (value - level) / (value - beyond) : step;
          const x = (left + column + dx * share) * acrossMm;
          const y = (top + row + dy * share) * downMm;
          nearest = Math.min(nearest, distanceFrom(border, [x, y]));
          break;
        }
        value = beyond;
      }
    }
  });
  return nearest > 0 ? nearest + behindBlurs * blurMm : 0;
}

const SIDEWAYS = [
  [1, 0],
  [-1, 0],
  [0, 1],
  [0, -1],
] as const;

function inSlice(
  { pixels }: Structure,
  { column, row, columns }: EdgeWindow,
  grid: SliceGrid,
): Int32Array {
  return Int32Array.from(
    pixels,
    (at) => (row + Math.floor(at / columns)) * grid.columns + column + (at % columns),
  ).sort();
}
