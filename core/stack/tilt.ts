import { cross, dot, gridNormal, length, normalise, subtract } from '../geometry/index.js';
import type { StackSlice } from './stack.js';

/** Below this the drift of the slices is rounding of the positions. */
const LEAST_TILT_DEG = 0.1;

/**
 * Angle between the slice normal and the line of the slice positions, degrees; 0 for an upright stack. Measured
 * from positions: Gantry/Detector Tilt is not meant for computing (PS3.3 C.8.15.3.3).
 */
export function tiltDegrees(slices: readonly StackSlice[]): number {
  const first = slices[0];
  const last = slices[slices.length - 1];
  if (first === undefined || last === undefined || first === last) return 0;
  const course = normalise(subtract(last.image.grid.positionMm, first.image.grid.positionMm));
  if (course === undefined) return 0;
  const normal = gridNormal(first.image.grid);
  const angle = (Math.atan2(length(cross(course, normal)), dot(course, normal)) * 180) / Math.PI;
  return angle < LEAST_TILT_DEG ? 0 : angle;
}
