import { describe, expect, it } from 'vitest';
import { type EdgeSums, fitEdge, riseDistanceMm } from '../../../../core/quality/index.js';

const spread = (points: readonly (readonly [number, number])[]): EdgeSums => ({
  reachMm: 2,
  weight: Float64Array.from(points, () => 1),
  across: Float64Array.from(points, ([t]) => t),
  share: Float64Array.from(points, ([, v]) => v),
});

describe('riseDistanceMm', () => {
  it('of a ramp over 2 mm is 1.6 mm', () => {
    const ramp = spread([
      [-2, 0],
      [-1, 0],
      [0, 0.5],
      [1, 1],
      [2, 1],
    ]);
    expect(riseDistanceMm(ramp)).toBeCloseTo(1.6, 12);
  });

  it('takes the crossings nearest to the middle, not those of an overshoot', () => {
    const ringing = spread([
      [-2, 0.2],
      [-1, 0],
      [0, 0.5],
      [1, 1],
      [1.5, 1.2],
      [2, 0.8],
    ]);
    expect(riseDistanceMm(ringing)).toBeCloseTo(1.6, 12);
  });

  it('is undefined for an edge that never comes to 90 %', () => {
    expect(
      riseDistanceMm(
        spread([
          [-1, 0],
          [0, 0.5],
          [1, 0.85],
        ]),
      ),
    ).toBeUndefined();
    expect(riseDistanceMm(spread([]))).toBeUndefined();
  });
});

describe('fitEdge', () => {
  it('is undefined for fewer than 24 pixels', () => {
    const few = Float64Array.from({ length: 23 }, (_, index) => index / 10 - 1.1);
    const samples = { acrossMm: few, alongMm: few.map(() => 0), hu: few };
    expect(fitEdge(samples, { lowHu: 0, stepHu: 1, sigmaMm: 1 })).toBeUndefined();
  });
});
