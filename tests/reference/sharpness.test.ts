import { describe, expect, it } from 'vitest';
import { normalSource, seededUniform } from '../../core/phantom/index.js';
import {
  addEdges,
  type EdgeSamples,
  edgeSums,
  fitEdge,
  jackknife,
  normalCdf,
  riseDistanceMm,
} from '../../core/quality/index.js';
import { pythonHas, pythonJson } from '../support/python.js';

/** An edge of 400 HU blurred by a Gaussian, slanted and bent, on pixels of 0.4 mm; exact Φ from the error function. */
function edge(sigmaMm: number, slantDeg: number, noiseHu = 0, seed = 1): EdgeSamples {
  const normal = normalSource(seededUniform(seed));
  const [across, along, hu]: [number[], number[], number[]] = [[], [], []];
  const slant = (slantDeg * Math.PI) / 180;
  for (let row = -20; row <= 20; row += 1) {
    for (let column = -20; column <= 20; column += 1) {
      const [x, y] = [0.4 * column + 0.07, 0.4 * row];
      const t = x * Math.cos(slant) + y * Math.sin(slant);
      const s = y * Math.cos(slant) - x * Math.sin(slant);
      if (Math.abs(t) > 5 || Math.abs(s) > 3) continue;
      across.push(t);
      along.push(s);
      const z = (t - 0.3 - 0.05 * s - 0.02 * s * s) / sigmaMm;
      hu.push(-50 + 400 * integrateNormal(z) + noiseHu * normal());
    }
  }
  return {
    acrossMm: Float64Array.from(across),
    alongMm: Float64Array.from(along),
    hu: Float64Array.from(hu),
  };
}

/** Φ by its series z + z³/3 + z⁵/(3·5) + …: another way than the product's (Abramowitz & Stegun 1964, 26.2.11). */
function integrateNormal(z: number): number {
  if (Math.abs(z) > 7) return z > 0 ? 1 : 0;
  let term = z;
  let sum = z;
  for (let k = 1; k < 200; k += 1) {
    term *= (z * z) / (2 * k + 1);
    sum += term;
  }
  return 0.5 + (sum * Math.exp(-0.5 * z * z)) / Math.sqrt(2 * Math.PI);
}

const start = { lowHu: 0, stepHu: 350, sigmaMm: 0.6 };

describe('the 10–90 % rise of a Gaussian-blurred edge', () => {
  // 2·Φ⁻¹(0.9) = 2.563103: any table of the normal distribution.
  it.each([
    [0.3, 12],
    [0.5, 33],
    [0.8, 5],
  ])('of σ = %d mm, slanted by %d°, is 2.563103 σ within 1.5 %', (sigma, slantDeg) => {
    const samples = edge(sigma, slantDeg);
    const fitted = fitEdge(samples, start);
    if (fitted === undefined) throw new Error('no edge');
    const rise = riseDistanceMm(edgeSums(samples, fitted, 4));
    // Points of one edge lie up to 0.1 mm apart, and straight lines between them cut the curve's corners.
    expect(Math.abs((rise ?? 0) / (2.563103 * sigma) - 1)).toBeLessThan(0.015);
  });

  it('is found within 4 % under noise of a tenth of the step, over eight edges', () => {
    const all = Array.from({ length: 8 }, (_, seed) => {
      const samples = edge(0.5, 7 + 10 * seed, 40, seed);
      const fitted = fitEdge(samples, start);
      if (fitted === undefined) throw new Error('no edge');
      return edgeSums(samples, fitted, 4);
    });
    const rise = jackknife(all.length, (leftOut) => riseDistanceMm(addEdges(all, leftOut)));
    expect(Math.abs((rise?.value ?? 0) / (2.563103 * 0.5) - 1)).toBeLessThan(0.04);
    expect(rise?.standardError).toBeLessThan(0.08);
  });
});

describe('fitEdge', () => {
  it('gives back level, step, place, slope, bend and blur of an edge', () => {
    const got = fitEdge(edge(0.5, 20), start);
    if (got === undefined) throw new Error('no edge');
    expect(got.lowHu).toBeCloseTo(-50, 2);
    expect(got.stepHu).toBeCloseTo(400, 2);
    expect(got.offsetMm).toBeCloseTo(0.3, 4);
    expect(got.slope).toBeCloseTo(0.05, 4);
    expect(got.curvaturePerMm).toBeCloseTo(0.02, 4);
    expect(got.sigmaMm).toBeCloseTo(0.5, 4);
  });

  const hasScipy = pythonHas('scipy');
  it.skipIf(!hasScipy)(
    `agrees with scipy’s least squares on a noisy edge${hasScipy ? '' : ' (skipped: no scipy)'}`,
    () => {
      const { acrossMm, alongMm, hu } = edge(0.6, 25, 30, 4);
      const got = fitEdge({ acrossMm, alongMm, hu }, start);
      const there = pythonJson(`
import json, numpy as np
from scipy.optimize import least_squares
from scipy.special import ndtr
t, s, hu = (np.array(v) for v in json.loads('''${JSON.stringify([[...acrossMm], [...alongMm], [...hu]])}'''))
fit = least_squares(lambda p: p[0] + p[1] * ndtr((t - p[2] - p[3] * s - p[4] * s * s) / p[5]) - hu, [0, 350, 0, 0, 0, .6], xtol=1e-12, ftol=1e-12)
print(json.dumps(fit.x.tolist()))
`) as number[];
      const ours = [
        got?.lowHu,
        got?.stepHu,
        got?.offsetMm,
        got?.slope,
        got?.curvaturePerMm,
        got?.sigmaMm,
      ];
      // A tenth of a per cent of the step, a hundredth of a millimetre: far below what the noise leaves open.
      [0.4, 0.4, 0.002, 0.002, 0.002, 0.005].forEach((tolerance, k) => {
        expect(Math.abs((ours[k] ?? Number.NaN) - (there[k] ?? Number.NaN))).toBeLessThan(
          tolerance,
        );
      });
    },
  );
});

describe('normalCdf', () => {
  it('is the normal distribution within 1e-7', () => {
    // Φ(1.959964) = 0.975, Φ(1.281552) = 0.9: tables.
    expect(Math.abs(normalCdf(1.9599639845) - 0.975)).toBeLessThan(1e-7);
    expect(Math.abs(normalCdf(-1.2815515655) - 0.1)).toBeLessThan(1e-7);
    for (let z = -5; z <= 5; z += 0.1)
      expect(Math.abs(normalCdf(z) - integrateNormal(z))).toBeLessThan(1e-7);
  });
});
