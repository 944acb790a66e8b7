import { describe, expect, it } from 'vitest';
import { jackknife } from '../../../../core/quality/index.js';

const VALUES = [3, 5, 6, 10];
const mean = (leftOut: number): number => {
  const kept = VALUES.filter((_, index) => index !== leftOut);
  return kept.reduce((sum, value) => sum + value, 0) / kept.length;
};

describe('jackknife', () => {
  it('gives a mean its classical standard error s/√n', () => {
    // Efron & Stein 1981: the two are identical. s² = 26/3.
    const got = jackknife(4, mean);
    expect(got?.value).toBe(6);
    expect(got?.standardError).toBeCloseTo(Math.sqrt(26 / 3 / 4), 12);
  });

  it('has no answer for one sample, or where the statistic has none', () => {
    expect(jackknife(1, () => 1)).toBeUndefined();
    expect(jackknife(3, () => undefined)).toBeUndefined();
    expect(jackknife(3, (leftOut) => (leftOut === 1 ? Number.NaN : 1))).toBeUndefined();
  });
});
