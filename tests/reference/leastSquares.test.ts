/**
 * The solver of the fitted stent against scipy.optimize.least_squares (trust region reflective, with the same bounds) on the same
 * data: annular means of a stent on two kernels. The model is written out again in Python, with scipy's Bessel functions.
 */
import { describe, expect, it } from 'vitest';
import { besselPair } from '../../core/quality/index.js';
import type { Annuli } from '../../core/stent/annuli.js';
import type { Apodisation } from '../../core/stent/apodisation.js';
import { FREQUENCIES } from '../../core/stent/frequencies.js';
import { levenbergMarquardt } from '../../core/stent/levenbergMarquardt.js';
import { BOUNDS } from '../../core/stent/roundFit.js';
import { roundMeans, roundProblem } from '../../core/stent/roundProblem.js';
import { listOf, PARAMETERS, type StentParameters } from '../../core/stent/stentModel.js';
import { pythonHas, pythonJson } from '../support/python.js';

const available = pythonHas('numpy', 'scipy');
const title = available
  ? 'levenbergMarquardt and scipy.optimize.least_squares'
  : 'levenbergMarquardt and scipy.optimize.least_squares (SKIPPED: install python3-scipy to run it)';

const RADII_MM = Array.from({ length: 14 }, (_, index) => 0.3 * index);
/** Hann and cosine windows (Harris 1978, doi 10.1109/PROC.1978.10837). */
const RESPONSES = [
  FREQUENCIES.map((f) => (f < 0.7 ? 0.5 + 0.5 * Math.cos((Math.PI * f) / 0.7) : 0)),
  FREQUENCIES.map((f) => (f < 1.2 ? Math.cos((Math.PI * f) / 2.4) : 0)),
];
const APODISATION: Apodisation = {
  kernels: RESPONSES.map((response) => ({ response, amplitude: response, endError: response })),
  scaleError: 0,
  bands: [],
};
const ANNULI: readonly Annuli[] = RESPONSES.map(() => ({
  radiusMm: RADII_MM,
  meanHu: new Float64Array(RADII_MM.length),
  waves: RADII_MM.map((radius) => FREQUENCIES.map((f) => besselPair(2 * Math.PI * f * radius).j0)),
  slices: 1,
}));

const SCIPY = `
import json, sys
import numpy as np
from scipy.optimize import least_squares
from scipy.special import j0, j1
data, sd, start, low, high, radii = [np.array(one) for one in json.loads(sys.argv[1])]
f = (np.arange(80) + 0.5) * 0.02
area = 2 * np.pi * f * 0.02
windows = [np.where(f < 0.7, 0.5 + 0.5 * np.cos(np.pi * f / 0.7), 0), np.where(f < 1.2, np.cos(np.pi * f / 2.4), 0)]
waves = j0(2 * np.pi * np.outer(radii, f))
def residuals(p):
    radius, wall, sigma, lumen, mass, wall_hu, fat, level = p
    k = 2 * np.pi * f
    disc = lambda r: r * j1(k * r) / f
    spectrum = (lumen - wall_hu) * disc(radius) + mass * 2 * np.pi * radius * j0(k * radius) + (wall_hu - fat) * disc(radius + wall)
    spectrum = spectrum * np.exp(-(k * sigma) ** 2 / 2) * area
    means = np.concatenate([waves @ (w * spectrum) + fat + (level if n == 0 else 0) for n, w in enumerate(windows)])
    expected = [(wall - 0.5) / 0.4, (sigma - 0.25) / 0.15, (wall_hu - 50) / 40, level / 5]
    return np.concatenate([(means - data) / sd, expected])
found = least_squares(residuals, start, bounds=(low, high), x_scale=[0.1, 0.1, 0.05, 50, 50, 20, 10, 2], xtol=1e-14, ftol=1e-14, gtol=1e-14, max_nfev=2000)
covariance = np.linalg.inv(found.jac.T @ found.jac)
print(json.dumps([found.x.tolist(), float(2 * found.cost), np.sqrt(np.diag(covariance)).tolist()]))
`;

const TRUTHS: readonly (readonly [string, Partial<StentParameters>])[] = [
  ['a wide stent', {}],
  ['a narrow one with much metal', { radiusMm: 1.2, massHuMm: 700, lumenHu: 420 }],
  ['a dark lumen', { radiusMm: 1.4, lumenHu: 90, massHuMm: 300 }],
];

describe.skipIf(!available)(title, () => {
  it.each(TRUTHS)('come to the same minimum and the same errors: %s', (_, change) => {
    const truth: StentParameters = {
      radiusMm: 1.7,
      wallWidthMm: 0.6,
      blurSigmaMm: 0.22,
      lumenHu: 330,
      massHuMm: 450,
      wallHu: 60,
      fatHu: -85,
      levelHu: 1,
      ...change,
    };
    const sdHu = 4;
    // Noise of no generator: fractional parts of a multiple of the golden ratio, made to have SD 1.
    const measured = roundMeans(ANNULI, APODISATION, truth).map(
      (value, index) => value + sdHu * Math.sqrt(12) * ((((index + 1) * 0.6180339887) % 1) - 0.5),
    );
    const lower = Array.from(measured, (_value, row) => {
      const line = new Float64Array(measured.length);
      line[row] = sdHu;
      return line;
    });
    const start = listOf({
      ...truth,
      radiusMm: truth.radiusMm + 0.15,
      lumenHu: 250,
      massHuMm: 400,
    });
    const bounds = PARAMETERS.map((name) => BOUNDS[name]);
    const problem = roundProblem(ANNULI, APODISATION, lower, measured);
    const ours = levenbergMarquardt(problem, start, bounds);
    if (ours === undefined) throw new Error('the fit did not come to an end');
    const [point, squares, errors] = pythonJson(SCIPY, [
      JSON.stringify([
        [...measured],
        Array.from(measured, () => sdHu),
        [...start],
        bounds.map(({ low }) => low),
        bounds.map(({ high }) => high),
        RADII_MM,
      ]),
    ]) as readonly [readonly number[], number, readonly number[]];
    expect(ours.squares).toBeCloseTo(squares, 3);
    PARAMETERS.forEach((name, index) => {
      const error = errors[index] ?? Number.NaN;
      const off = (ours.point[index] ?? Number.NaN) - (point[index] ?? Number.NaN);
      // A fortieth of the standard error: what stopping a little earlier may leave.
      expect(Math.abs(off), name).toBeLessThan(error / 40);
      const own = Math.sqrt(ours.covariance[index]?.[index] ?? Number.NaN);
      expect(own / error, name).toBeGreaterThan(0.98);
      expect(own / error, name).toBeLessThan(1.02);
    });
  });
});
