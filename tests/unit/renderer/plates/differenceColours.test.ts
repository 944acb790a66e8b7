import { describe, expect, it } from 'vitest';
import { mapDifferences } from '../../../../renderer/plates/differenceColours.js';

const coloursOf = (hu: readonly number[], rangeHu: number) => {
  const target = new Uint32Array(hu.length);
  mapDifferences(Float32Array.from(hu), rangeHu, target);
  return [...target].map((word) => [
    word & 255,
    (word >> 8) & 255,
    (word >> 16) & 255,
    word >>> 24,
  ]);
};

/** Relative luminance of sRGB, IEC 61966-2-1 with the weights of ITU-R BT.709; from memory. */
const luminance = ([r = 0, g = 0, b = 0]: readonly number[]): number => {
  const linear = (byte: number): number => {
    const part = byte / 255;
    return part <= 0.04045 ? part / 12.92 : ((part + 0.055) / 1.055) ** 2.4;
  };
  return 0.2126 * linear(r) + 0.7152 * linear(g) + 0.0722 * linear(b);
};

describe('The colours of differences', () => {
  it('are a neutral grey at zero, blue below and orange above, and end at the range', () => {
    expect(coloursOf([0, -200, 200, -5000, 5000], 200)).toEqual([
      [0x5f, 0x5f, 0x5f, 255],
      [0x6c, 0xc5, 0xff, 255],
      [0xff, 0xb0, 0x54, 255],
      [0x6c, 0xc5, 0xff, 255],
      [0xff, 0xb0, 0x54, 255],
    ]);
  });

  it('are nothing where there is no data', () => {
    expect(coloursOf([Number.NaN], 200)).toEqual([[0, 0, 0, 0]]);
  });

  it('are about as bright on both sides at the same size, and brighten outwards', () => {
    const [low = [], half = [], high = []] = coloursOf([-200, 100, 200], 200);
    expect(luminance(high) / luminance(low)).toBeGreaterThan(0.9);
    expect(luminance(high) / luminance(low)).toBeLessThan(1.1);
    expect(luminance(half)).toBeLessThan(luminance(high));
  });
});
