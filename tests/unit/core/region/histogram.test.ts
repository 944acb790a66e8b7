import { describe, expect, it } from 'vitest';
import { pairedHistogram } from '../../../../core/region/histogram.js';

// Expected widths and counts: numpy 1.24.2, histogram_bin_edges(soft + sharp, bins='fd') and histogram() of each.
const soft = [
  347, 347, 343, 341, 358, 343, 353, 355, 371, 347, 360, 365, 368, 343, 351, 375, 380, 378, 343,
  379, 346, 357, 376, 355, 361, 368, 368, 368, 369, 362, 373, 376, 344, 361, 341, 340, 349, 369,
  360, 359, 346, 367, 348, 364, 348, 363, 380, 351, 378, 369, 379, 368, 364, 370, 371, 374, 370,
  351, 350, 366,
];
const sharp = [
  385, 341, 418, 333, 356, 407, 323, 324, 324, 308, 304, 323, 333, 316, 370, 405, 351, 368, 366,
  319, 418, 348, 402, 407, 374, 346, 319, 301, 370, 406, 335, 337, 350, 374, 394, 355, 309, 406,
  412, 348, 408, 343, 320, 338, 377, 401, 307, 333, 360, 366, 354, 319, 363, 342, 359, 309, 353,
  354, 419, 393,
];

describe('pairedHistogram', () => {
  it('has the bins of numpy’s Freedman–Diaconis rule over both kernels, and its counts', () => {
    const histogram = pairedHistogram(soft, sharp);
    expect(histogram?.startHu).toBe(301);
    expect(histogram?.binWidthHu).toBeCloseTo(10.727272727272748, 10);
    expect(histogram?.soft).toEqual([0, 0, 0, 7, 14, 14, 19, 6, 0, 0, 0]);
    expect(histogram?.sharp).toEqual([6, 5, 7, 6, 8, 5, 7, 2, 2, 8, 4]);
  });
  it('agrees with numpy when a value lies on the last edge', () => {
    const histogram = pairedHistogram([1, 2, 2, 3, 3], [3, 4, 4, 5, 9]);
    expect(histogram?.binWidthHu).toBeCloseTo(1.6, 12);
    expect(histogram?.soft.map((count, i) => count + (histogram.sharp[i] ?? 0))).toEqual([
      3, 5, 1, 0, 1,
    ]);
  });
  it('loses and doubles no pixel at edges that are no binary fractions', () => {
    const values = Array.from({ length: 1000 }, (_, i) => (i % 100) / 10);
    const histogram = pairedHistogram(values, []);
    expect(histogram?.soft.reduce((sum, count) => sum + count, 0)).toBe(1000);
    expect(histogram?.sharp.every((count) => count === 0)).toBe(true);
  });
  it('puts one value only into one bin of 1 HU about it', () => {
    expect(pairedHistogram([40, 40], [40])).toEqual({
      startHu: 39.5,
      binWidthHu: 1,
      soft: [2],
      sharp: [1],
    });
  });
  it('never makes bins finer than 1 HU', () => {
    const values = Array.from({ length: 100_000 }, (_, i) => i % 8);
    expect(pairedHistogram(values, [])?.binWidthHu).toBe(1);
  });
  it('never makes more than 200 bins', () => {
    const values = [...Array.from({ length: 400 }, (_, i) => i % 20), 3000];
    expect(pairedHistogram(values, [])?.soft).toHaveLength(200);
  });
  it('falls back to Sturges when the middle half is one value', () => {
    // ⌈log₂ 16⌉ + 1 = 5 (Sturges 1926; numpy bins='sturges' makes 5 for 16 values).
    const values = [...Array.from({ length: 14 }, () => 50), 0, 100];
    expect(pairedHistogram(values, [])?.soft).toEqual([1, 0, 14, 0, 1]);
  });
  it('is undefined without any pixel and throws at what is no number', () => {
    expect(pairedHistogram([], [])).toBeUndefined();
    expect(() => pairedHistogram([1, Number.NaN], [])).toThrow('invalid HU in histogram: NaN');
  });
});
