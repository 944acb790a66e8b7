import { describe, expect, it } from 'vitest';
import { levenbergMarquardt } from '../../../../core/stent/levenbergMarquardt.js';

/** NIST StRD nonlinear regression, data set Misra1a (lower difficulty): y = b1·(1 − exp(−b2·x)). From memory of its table. */
const X = [
  77.6, 114.9, 141.1, 190.8, 239.9, 289.0, 332.8, 378.4, 434.8, 477.3, 536.8, 593.1, 689.1, 760.0,
];
const Y = [
  10.07, 14.73, 17.94, 23.93, 29.61, 35.18, 40.02, 44.82, 50.76, 55.05, 61.01, 66.4, 75.47, 81.78,
];

function misra(point: Float64Array) {
  const [b1 = 0, b2 = 0] = point;
  return {
    residuals: Float64Array.from(X, (x, k) => b1 * (1 - Math.exp(-b2 * x)) - (Y[k] ?? 0)),
    slopes: [
      Float64Array.from(X, (x) => 1 - Math.exp(-b2 * x)),
      Float64Array.from(X, (x) => b1 * x * Math.exp(-b2 * x)),
    ],
  };
}
const FREE = [
  { low: -1e6, high: 1e6 },
  { low: -1e3, high: 1e3 },
];

describe('levenbergMarquardt', () => {
  it('finds the certified values of NIST Misra1a from its first start', () => {
    const fit = levenbergMarquardt(misra, Float64Array.of(500, 0.0001), FREE);
    expect(fit?.point[0]).toBeCloseTo(238.94212918, 0);
    expect(fit?.point[1]).toBeCloseTo(5.5015643181e-4, 6);
    expect(fit?.squares).toBeCloseTo(0.12455138894, 3);
    // Certified standard deviation of b1 is 2.7070075241, from 12 degrees of freedom.
    const se = Math.sqrt(((fit?.covariance[0]?.[0] ?? 0) * (fit?.squares ?? 0)) / 12);
    expect(se).toBeCloseTo(2.7070075241, 1);
  });

  it('stops at a bound, and holds what is fixed', () => {
    const bounded = levenbergMarquardt(misra, Float64Array.of(150, 0.0005), [
      { low: 0, high: 200 },
      { low: 0, high: 1 },
    ]);
    expect(bounded?.point[0]).toBe(200);
    const fixed = levenbergMarquardt(misra, Float64Array.of(150, 0.0005), [
      { low: 0, high: 500 },
      { low: 0.0005, high: 0.0005 },
    ]);
    expect(fixed?.point[1]).toBe(0.0005);
    const x = X.map((value) => 1 - Math.exp(-0.0005 * value));
    const best = x.reduce((s, a, k) => s + a * (Y[k] ?? 0), 0) / x.reduce((s, a) => s + a * a, 0);
    expect(fixed?.point[0]).toBeCloseTo(best, 4);
  });
});
