import type { StoredValues } from '../dicom/index.js';
import { isPadding, rescaled } from '../intensity/index.js';
import { type Shape, visitRuns } from '../region/index.js';
import type { StackSlice } from '../stack/index.js';

/**
 * Share of a plaque region's pixels that lie within one blur of enhanced lumen, 0 to 1: the lumen's light spreads as
 * far as that. A pixel counts as lumen from half way between the plaque's median and the lumen's mean.
 *
 * @returns null where the plaque is no darker than the lumen, or no pixel lies inside: nothing can be told then
 */
export function spillShare(
  shape: Shape,
  { image: { grid, pixels } }: StackSlice,
  stored: StoredValues,
  { medianHu, lumenHu, blurMm }: Levels,
): number | null {
  if (!(medianHu < lumenHu)) return null;
  const levelHu = (medianHu + lumenHu) / 2;
  const { columns, rows, pixelSpacingMm } = grid;
  const reach = offsetsWithin(blurMm, pixelSpacingMm);
  const isLumen = (column: number, row: number): boolean => {
    if (column < 0 || row < 0 || column >= columns || row >= rows) return false;
    const value = stored[row * columns + column] as number;
    return !isPadding(value, pixels) && rescaled(value, pixels) >= levelHu;
  };
  let n = 0;
  let near = 0;
  visitRuns(shape, grid, (from, end) => {
    for (let index = from; index < end; index += 1) {
      const column = index % columns;
      const row = (index - column) / columns;
      n += 1;
      if (reach.some(([dx, dy]) => isLumen(column + dx, row + dy))) near += 1;
    }
  });
  return n === 0 ? null : near / n;
}

/** Levels of plaque and lumen, HU, and the full width at half maximum of the kernel's blur. */
export interface Levels {
  readonly medianHu: number;
  readonly lumenHu: number;
  readonly blurMm: number;
}

/** Steps in columns and rows that stay within a distance. */
function offsetsWithin(
  mm: number,
  [down, across]: readonly [number, number],
): readonly (readonly [number, number])[] {
  const [dx, dy] = [Math.floor(mm / across), Math.floor(mm / down)];
  const steps: [number, number][] = [];
  for (let y = -dy; y <= dy; y += 1)
    for (let x = -dx; x <= dx; x += 1)
      if ((x * across) ** 2 + (y * down) ** 2 <= mm * mm) steps.push([x, y]);
  return steps;
}
