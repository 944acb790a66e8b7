import type { SliceGrid } from './grid.js';
import { scale, type Vec3 } from './vec3.js';

/** The letters at the four sides of a plate. */
export interface OrientationLetters {
  readonly left: string;
  readonly right: string;
  readonly top: string;
  readonly bottom: string;
}

/** The two ends of each patient axis, LPS: x grows to the left, y to the back, z to the head (PS3.3 C.7.6.2.1.1). */
const AXES = [
  ['R', 'L'],
  ['A', 'P'],
  ['F', 'H'],
] as const;

/** A direction cosine below this adds no letter: one degree off an axis is still that axis. */
const NEGLIGIBLE = 0.0175;

/**
 * The letters of the anatomical direction that a unit vector points to, the largest component first, in the
 * way of Patient Orientation (PS3.3 C.7.6.1.1.1): 'L', 'LP', 'HLA'.
 */
export function directionLetters(direction: Vec3): string {
  return AXES.map(([negative, positive], axis) => {
    const cosine = direction[axis] ?? 0;
    return { size: Math.abs(cosine), letter: cosine < 0 ? negative : positive };
  })
    .filter(({ size }) => size > NEGLIGIBLE)
    .sort((a, b) => b.size - a.size)
    .map(({ letter }) => letter)
    .join('');
}

/** The letters around a slice that is shown with its first pixel at the top left. */
export function orientationLetters(grid: SliceGrid): OrientationLetters {
  return {
    left: directionLetters(scale(grid.rowDirection, -1)),
    right: directionLetters(grid.rowDirection),
    top: directionLetters(scale(grid.columnDirection, -1)),
    bottom: directionLetters(grid.columnDirection),
  };
}
