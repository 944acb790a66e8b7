import {
  dot,
  gridNormal,
  length,
  normalise,
  type SliceGrid,
  scale,
  subtract,
  type Vec3,
} from '../geometry/index.js';

/**
 * What the thickness of the slices does to an oblique plane. A slice is a mean over its thickness along its own normal; seen
 * from a plane at an angle θ to the slices, that is a mean over T·sin θ along a direction in the plane and over T·cos θ
 * across it.
 */
export interface ThicknessInPlane {
  /** The direction in the plane, unit length; undefined for a plane parallel to the slices. */
  readonly direction: Vec3 | undefined;
  /** Length of the mean along that direction, mm. */
  readonly alongMm: number;
  /** And across the plane, mm. */
  readonly acrossMm: number;
}

/** Splits a slice's thickness on a plane. @param thicknessMm of the slices, as they were reconstructed */
export function thicknessInPlane(
  plane: SliceGrid,
  slice: SliceGrid,
  thicknessMm: number,
): ThicknessInPlane {
  const [normal, own] = [gridNormal(plane), gridNormal(slice)];
  const cosine = dot(normal, own);
  const inPlane = subtract(own, scale(normal, cosine));
  const sine = length(inPlane);
  return {
    direction: sine > 1e-9 ? normalise(inPlane) : undefined,
    alongMm: thicknessMm * sine,
    acrossMm: thicknessMm * Math.abs(cosine),
  };
}
