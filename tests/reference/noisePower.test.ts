import { describe, expect, it } from 'vitest';
import { measureSharpness } from '../../core/pairing/sharpness.js';
import { apodisation, normalSource, seededUniform } from '../../core/phantom/index.js';
import {
  addRings,
  detrendQuadratic,
  makeFft,
  meanFrequency,
  noisePower,
  peakFrequency,
  radialSpectrum,
  ringSums,
} from '../../core/quality/index.js';
import { makePair, type ProjectionCache } from '../bench/evidence/phantomPair.js';
import { pythonHas, pythonJson } from '../support/python.js';

const variance = (values: Float64Array): number => {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / values.length;
};

const whiteNoise = (size: number, sigma: number, seed: number): Float64Array => {
  const normal = normalSource(seededUniform(seed));
  return Float64Array.from({ length: size * size }, () => sigma * normal());
};

/** White noise smoothed with a Gaussian on a torus, by its transform: exact for every lag. */
function smoothedNoise(size: number, sigmaPx: number, seed: number): Float64Array {
  const fft = makeFft(size);
  const re = whiteNoise(size, 1, seed);
  const im = new Float64Array(size * size);
  const along = (forward: boolean, step: number, stride: number): void => {
    for (let line = 0; line < size; line += 1) {
      const at = (k: number): number => line * step + k * stride;
      const a = Float64Array.from({ length: size }, (_, k) => re[at(k)] ?? 0);
      const b = Float64Array.from({ length: size }, (_, k) => im[at(k)] ?? 0);
      (forward ? fft.forward : fft.inverse)(a, b);
      for (let k = 0; k < size; k += 1) {
        re[at(k)] = a[k] ?? 0;
        im[at(k)] = b[k] ?? 0;
      }
    }
  };
  along(true, size, 1);
  along(true, 1, size);
  const f = (k: number): number => Math.min(k, size - k) / size;
  for (let index = 0; index < re.length; index += 1) {
    const square = f(index % size) ** 2 + f(Math.floor(index / size)) ** 2;
    const factor = Math.exp(-2 * Math.PI ** 2 * sigmaPx ** 2 * square);
    re[index] = (re[index] ?? 0) * factor;
    im[index] = (im[index] ?? 0) * factor;
  }
  along(false, size, 1);
  along(false, 1, size);
  return re;
}

describe('noisePower, by AAPM report 233 (2019) and IAEA handbook (2014) eq. 4.42', () => {
  it('of [[1,−1],[2,−2]] at 0.5 mm, mean removed, is [[0,2.25],[0,0.25]]', () => {
    // Worked by hand: DFT [[0,6],[0,−2]], times 0.25/4 of its squares.
    const { values, stepPerMm } = noisePower(Float64Array.from([1, -1, 2, -2]), 2, 2, [0.5, 0.5]);
    expect([...values]).toEqual([0, 2.25, 0, 0.25]);
    const sum = values.reduce((total, value) => total + value, 0);
    expect(sum * stepPerMm[0] * stepPerMm[1]).toBe(2.5);
  });

  it('sums to the variance, on oblong pixels and with zeros around the area (Parseval)', () => {
    const values = whiteNoise(20, 7, 3).subarray(0, 20 * 13);
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    const rest = values.map((value) => value - mean);
    const { values: power, stepPerMm, columns, rows } = noisePower(rest, 20, 13, [0.4, 0.7]);
    expect([columns, rows]).toEqual([32, 16]);
    const sum = power.reduce((total, value) => total + value, 0);
    expect((sum * stepPerMm[0] * stepPerMm[1]) / variance(values)).toBeCloseTo(1, 12);
  });

  it('of white noise of 20 HU at 0.4 mm is level at σ²ΔxΔy = 64 HU²mm²', () => {
    const sums = Array.from({ length: 40 }, (_, seed) =>
      ringSums(noisePower(whiteNoise(32, 20, seed), 32, 32, [0.4, 0.4]), 0.08, 16),
    );
    const { powerHu2Mm2 } = radialSpectrum(addRings(sums));
    // Each ring is a mean over 40 areas of 12 or more places: ±5 % is three of its standard errors at the first.
    const [, second, ...rest] = powerHu2Mm2;
    expect(second).toBeGreaterThan(64 * 0.9);
    for (const level of rest) expect(Math.abs(level / 64 - 1)).toBeLessThan(0.06);
    const mean = powerHu2Mm2.reduce((sum, level) => sum + level, 0) / powerHu2Mm2.length;
    expect(Math.abs(mean / 64 - 1)).toBeLessThan(0.02);
  });

  it.each([
    [1, 0.28209],
    [1.5, 0.18806],
    [2, 0.14105],
  ])(
    'leaves 1/(2√π σ) of white noise after a Gaussian of σ = %d pixels, and its correlation',
    (sigma, ratio) => {
      // Closed form of the continuous Gaussian; the simulation of the reference gave .28194, .18784 and .14040.
      const size = 128;
      const images = [1, 2, 3, 4].map((seed) => smoothedNoise(size, sigma, seed));
      const powers = images.map((image) => noisePower(image, size, size, [1, 1]).values);
      const mean = powers[0]?.map((_, k) => powers.reduce((s, p) => s + (p[k] ?? 0), 0) / 4);
      if (mean === undefined) throw new Error('no spectrum');
      const total = mean.reduce((sum, value) => sum + value, 0);
      expect(Math.abs(Math.sqrt(total) / size / ratio - 1)).toBeLessThan(0.03);
      // The autocorrelation is the inverse transform of the spectrum: exp(−r²/4σ²).
      const lag = (r: number): number =>
        mean.reduce((s, p, k) => s + p * Math.cos((2 * Math.PI * r * (k % size)) / size), 0) /
        total;
      for (const r of [1, 2, 3])
        expect(Math.abs(lag(r) - Math.exp(-(r * r) / (4 * sigma * sigma)))).toBeLessThan(0.03);
    },
  );

  const hasNumpy = pythonHas('numpy');
  it.skipIf(!hasNumpy)(
    `equals numpy’s fft2 on the same area to 1e-9${hasNumpy ? '' : ' (skipped: no numpy)'}`,
    () => {
      const values = whiteNoise(30, 25, 9).map((value, index) => value + 0.4 * (index % 30));
      const rest = detrendQuadratic(values, 30, 30);
      const [restThere, powerThere] = pythonJson(`
import json, numpy as np
z = np.array(${JSON.stringify([...values])}).reshape(30, 30)
y, x = np.mgrid[0:30, 0:30] / 10.0
basis = np.stack([np.ones_like(x), x, y, x*y, x*x, y*y], -1).reshape(-1, 6)
fit = basis @ np.linalg.lstsq(basis, z.ravel(), rcond=None)[0]
rest = z - fit.reshape(30, 30)
power = 0.4 * 0.5 / 900 * np.abs(np.fft.fft2(rest, (32, 32)))**2
print(json.dumps([rest.ravel().tolist(), power.ravel().tolist()]))
`) as [number[], number[]];
      const { values: power } = noisePower(rest, 30, 30, [0.4, 0.5]);
      rest.forEach((value, k) => {
        expect(Math.abs(value - (restThere[k] ?? Number.NaN))).toBeLessThan(1e-9);
      });
      const most = Math.max(...powerThere);
      power.forEach((value, k) => {
        expect(Math.abs(value - (powerThere[k] ?? Number.NaN)) / most).toBeLessThan(1e-9);
      });
    },
  );
});

describe('the noise of filtered back projection', () => {
  const projections: ProjectionCache = new Map();

  // NPS ∝ f·W(f)² and, from it, mean and peak frequency in cut-offs (Kak & Slaney 1988 chapter 3, integrated).
  it.each([
    ['hann', 0.9, 0.17412, 0.15282],
    ['cosine', 0.9, 0.21975, 0.20794],
    ['shepp-logan', 0.8, 0.30335, 0.37101],
  ] as const)(
    'of %s has the shape f·W² in uniform areas',
    async (window, cutOffPerMm, average, peak) => {
      const kernel = { apodisation: window, cutOffPerMm };
      const grid = { centreMm: [12, -14], fieldOfViewMm: 88, matrix: 220 } as const;
      const recipe = { kernel, grid, heightsMm: [6, 20], layers: 1 };
      const [{ stack, stored }] = makePair(
        {
          seed: 5,
          scene: 1,
          photonsPerRay: 1e5,
          blurSigmaMm: 0.2,
          views: 240,
          first: recipe,
          // Not looked at: one small slice.
          second: { ...recipe, heightsMm: [6], grid: { ...grid, matrix: 8 } },
        },
        projections,
      );
      const got = await measureSharpness(stack, stack, async (_, index) => stored[index], {
        slices: 2,
      });
      const spectrum = got.noise?.texture.first;
      if (spectrum === undefined) throw new Error('no spectrum');
      // In the table τ = 1/(2·cut-off). Detrending takes the lowest ring and linear interpolation between detectors
      // some of the highest: 8 %. The peak is one of the rings, 0.08 /mm apart, and flat for the wide kernels.
      const foreseen = average * 2 * cutOffPerMm;
      expect(Math.abs((meanFrequency(spectrum) ?? 0) / foreseen - 1)).toBeLessThan(0.08);
      expect(Math.abs((peakFrequency(spectrum) ?? 0) - peak * 2 * cutOffPerMm)).toBeLessThan(0.13);
      const shape = spectrum.frequencyPerMm.map((f) => f * apodisation(kernel, f) ** 2);
      const scale =
        spectrum.powerHu2Mm2.reduce((s, p) => s + p, 0) / shape.reduce((s, p) => s + p, 0);
      const most = Math.max(...shape) * scale;
      spectrum.powerHu2Mm2.forEach((power, k) => {
        const f = spectrum.frequencyPerMm[k] ?? 0;
        // A wide kernel ends with a step, which an area of 12 mm shows as a slope over a ring to either side.
        if (Math.abs(f - cutOffPerMm) < 0.09) return;
        expect(Math.abs(power - scale * (shape[k] ?? 0)) / most).toBeLessThan(0.2);
      });
    },
    30_000,
  );
});
