import type { PixelPoint } from '../../core/geometry/index.js';

/** A side between a pixel of a set and one that is not: from corner to corner, in pixel indices (a corner is at ½). */
export type PixelSide = readonly [PixelPoint, PixelPoint];

/** The outline of a set of pixels of a slice. */
export function pixelOutline(pixels: ArrayLike<number>, columns: number): readonly PixelSide[] {
  const held = new Set(Array.from(pixels));
  const sides: PixelSide[] = [];
  for (const pixel of held) {
    const row = Math.floor(pixel / columns);
    const column = pixel - row * columns;
    const isHeld = (across: number, down: number): boolean =>
      column + across >= 0 &&
      column + across < columns &&
      held.has(pixel + across + down * columns);
    const corner = (across: number, down: number): PixelPoint => ({
      column: column + across / 2,
      row: row + down / 2,
    });
    if (!isHeld(0, -1)) sides.push([corner(-1, -1), corner(1, -1)]);
    if (!isHeld(0, 1)) sides.push([corner(-1, 1), corner(1, 1)]);
    if (!isHeld(-1, 0)) sides.push([corner(-1, -1), corner(-1, 1)]);
    if (!isHeld(1, 0)) sides.push([corner(1, -1), corner(1, 1)]);
  }
  return sides;
}
