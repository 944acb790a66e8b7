import { describe, expect, it } from 'vitest';
import { pixelOutline } from '../../../../renderer/plates/pixelOutline.js';

describe('The outline of pixels', () => {
  it('is the four sides of one', () => {
    const at = (column: number, row: number) => ({ column, row });
    expect(pixelOutline([6], 5)).toEqual([
      [at(0.5, 0.5), at(1.5, 0.5)],
      [at(0.5, 1.5), at(1.5, 1.5)],
      [at(0.5, 0.5), at(0.5, 1.5)],
      [at(1.5, 0.5), at(1.5, 1.5)],
    ]);
  });

  it('has no side between two that touch, and does not go on around the end of a row', () => {
    expect(pixelOutline([6, 7], 5)).toHaveLength(6);
    // The last of a row and the first of the next lie at opposite borders.
    expect(pixelOutline([4, 5], 5)).toHaveLength(8);
    expect(pixelOutline([], 5)).toEqual([]);
  });
});
