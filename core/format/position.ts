import type { Vec3 } from '../geometry/index.js';
import { formatFixed } from './number.js';

const SIDES = [
  ['R', 'L'],
  ['A', 'P'],
  ['F', 'H'],
] as const;

/**
 * A place in patient space by its sides: 'L 35.3 · A 20.7 · H 10.0 mm'. Axes are LPS (PS3.3 C.7.6.2.1.1): x grows to
 * the left, y to the back, z to the head. A coordinate that rounds to zero is given the positive side.
 */
export function formatPosition(pointMm: Vec3, digits = 1): string {
  const parts = SIDES.map(([negative, positive], axis) => {
    const text = formatFixed(Math.abs(pointMm[axis] ?? Number.NaN), digits);
    const isNegative = (pointMm[axis] ?? 0) < 0 && /[1-9]/.test(text);
    return `${isNegative ? negative : positive} ${text}`;
  });
  return `${parts.join(' · ')} mm`;
}
