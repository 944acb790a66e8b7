import { describe, expect, it } from 'vitest';
import { besselPair } from '../../../../core/quality/index.js';
import { FREQUENCIES } from '../../../../core/stent/frequencies.js';
import { leaningApodisation } from '../../../../core/stent/leaningApodisation.js';
import { cholesky, inverseSymmetric, solveSymmetric } from '../../../../core/stent/linear.js';
import { atRadius, modelProfiles } from '../../../../core/stent/modelProfile.js';
import {
  listOf,
  PARAMETERS,
  parametersOf,
  type StentParameters,
  stentSpectrum,
} from '../../../../core/stent/stentModel.js';
import { distanceFrom, fitAxis, tiltDegOf } from '../../../../core/stent/vesselAxis.js';

const STENT: StentParameters = {
  radiusMm: 1.6,
  wallWidthMm: 0.5,
  blurSigmaMm: 0.35,
  lumenHu: 300,
  massHuMm: 500,
  wallHu: 60,
  fatHu: -90,
  levelHu: 0,
};
const open = FREQUENCIES.map(() => 1);
const APODISATION = {
  kernels: [{ response: open, amplitude: open, endError: open.map(() => 0) }],
  scaleError: 0.01,
  bands: [],
};

/** The stent of a plane, blurred by a Gaussian, summed over a fine lattice: nothing of the model's mathematics. */
function blurredByHand(at: number, stent: StentParameters): number {
  const { radiusMm, wallWidthMm, blurSigmaMm, lumenHu, massHuMm, wallHu, fatHu } = stent;
  const thick = 0.1;
  let [sum, weights] = [0, 0];
  const step = 0.01;
  for (let x = -1.8; x <= 1.8; x += step)
    for (let y = -1.8; y <= 1.8; y += step) {
      const weight = Math.exp(-(x * x + y * y) / (2 * blurSigmaMm ** 2));
      const r = Math.hypot(at + x, y);
      const base = r < radiusMm ? lumenHu : r < radiusMm + wallWidthMm ? wallHu : fatHu;
      const ring = Math.abs(r - radiusMm) < thick / 2 ? massHuMm / thick : 0;
      sum += weight * (base + ring);
      weights += weight;
    }
  return sum / weights;
}

describe('the model of a stent', () => {
  it('is the blurred disc, ring and wall that a sum over the plane gives, within 3 HU', () => {
    const [profile] = modelProfiles(STENT, APODISATION);
    for (const at of [0, 0.5, 1, 1.6, 2, 2.6, 3.5])
      expect(
        Math.abs(atRadius(profile?.hu ?? new Float64Array(300), at) - blurredByHand(at, STENT)),
      ).toBeLessThan(3);
  });

  // MTF exp(−2π²σ²f²): half at 0.187391/σ, a tenth at 0.341541/σ.
  it.each([
    [0.5, 0.187391],
    [0.1, 0.341541],
  ])('is blurred to %f of itself at the frequency that a Gaussian has it at', (part, times) => {
    const index = 40;
    const f = FREQUENCIES[index] ?? Number.NaN;
    const blurred = stentSpectrum({ ...STENT, blurSigmaMm: times / f }).value[index] ?? Number.NaN;
    const plain = stentSpectrum({ ...STENT, blurSigmaMm: 0 }).value[index] ?? Number.NaN;
    expect(blurred / plain).toBeCloseTo(part, 5);
  });

  it('has the slopes that small changes of each parameter give', () => {
    const point = listOf(STENT);
    const { slopes } = stentSpectrum(STENT);
    PARAMETERS.forEach((_, k) => {
      const step = 1e-4 * Math.max(1, Math.abs(point[k] ?? 0));
      const moved = (sign: number) => {
        const list = Float64Array.from(point);
        list[k] = (list[k] ?? 0) + sign * step;
        return stentSpectrum(parametersOf(list)).value;
      };
      const [up, down] = [moved(1), moved(-1)];
      const largest = Math.max(1e-6, ...(slopes[k] ?? []).map(Math.abs));
      up.forEach((value, index) => {
        const slope = (value - (down[index] ?? 0)) / (2 * step);
        // The Bessel functions are told to 2e-7, which a difference of two magnifies.
        expect(Math.abs(slope - (slopes[k]?.[index] ?? 9))).toBeLessThan(2e-3 * largest + 2e-3);
      });
    });
  });

  it('narrows the kernel of a leaning tube by (1 + cos tilt)/2', () => {
    const response = FREQUENCIES.map((f) => Math.exp(-f));
    const leaning = leaningApodisation(
      { ...APODISATION, kernels: [{ response, amplitude: response, endError: response }] },
      { centre: [0, 0], drift: [Math.tan((20 * Math.PI) / 180), 0] },
    );
    const part = (1 + Math.cos((20 * Math.PI) / 180)) / 2;
    expect(leaning.kernels[0]?.response[30]).toBeCloseTo(
      Math.exp(-(FREQUENCIES[30] ?? 0) * part),
      4,
    );
  });
});

describe('the axis of a vessel', () => {
  it('is the straight line through the centres, with the tilt of its drift', () => {
    const tangent = Math.tan((15 * Math.PI) / 180);
    const axis = fitAxis(
      [-1, -0.5, 0, 0.5].map((zMm) => ({ zMm, at: [0.2 + tangent * zMm, -0.1] as const })),
    );
    expect(axis.centre[0]).toBeCloseTo(0.2, 12);
    expect(axis.centre[1]).toBeCloseTo(-0.1, 12);
    expect(tiltDegOf(axis)).toBeCloseTo(15, 10);
  });

  it('makes a circle again of the ellipse that a leaning tube is cut to', () => {
    const distance = distanceFrom({ centre: [0, 0], drift: [0, Math.tan(Math.PI / 9)] });
    expect(distance(1.5, 0)).toBeCloseTo(1.5, 12);
    expect(distance(0, 1.5 / Math.cos(Math.PI / 9))).toBeCloseTo(1.5, 12);
  });
});

describe('symmetric equations', () => {
  const matrix = [Float64Array.of(4, 2, 0.4), Float64Array.of(2, 5, 1), Float64Array.of(0.4, 1, 3)];

  it('are solved, and the inverse times the matrix is 1', () => {
    const x = solveSymmetric(matrix, Float64Array.of(1, 2, 3));
    matrix.forEach((row, i) => {
      expect(row.reduce((sum, value, j) => sum + value * (x[j] ?? 0), 0)).toBeCloseTo(i + 1, 12);
    });
    const inverse = inverseSymmetric(matrix) ?? [];
    expect(
      matrix[1]?.reduce((sum, value, k) => sum + value * (inverse[k]?.[1] ?? 0), 0),
    ).toBeCloseTo(1, 12);
  });

  it('are refused where the matrix is not positive', () => {
    expect(cholesky([Float64Array.of(1, 2), Float64Array.of(2, 1)])).toBeUndefined();
  });

  it('rest on Bessel functions of handbook values (Abramowitz & Stegun 1964, table 9.1)', () => {
    expect(besselPair(1).j0).toBeCloseTo(0.7651976866, 6);
    expect(besselPair(5).j1).toBeCloseTo(-0.3275791376, 6);
  });
});
