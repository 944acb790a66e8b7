import { describe, expect, it } from 'vitest';
import {
  covarianceSums,
  type KernelTexture,
  localNoiseShare,
  type PixelRun,
  standardErrorOfMean,
  summedCovariance,
  textureCovariance,
} from '../../../../core/quality/index.js';

/** White noise of SD 1 after a Gaussian of σ pixels: NPS = Δ²·exp(−4π²σ²f²), pixels of 1 mm. */
function smoothedWhite(sigma: number): KernelTexture {
  const frequencyPerMm = Array.from({ length: 100 }, (_, k) => (k + 1) * 0.005);
  return {
    // REFERENCE: 1/(2√π σ), the SD of white noise after that Gaussian.
    noiseSdHu: 1 / (2 * Math.sqrt(Math.PI) * sigma),
    areas: 10,
    frequencyPerMm,
    powerHu2Mm2: frequencyPerMm.map((f) => Math.exp(-4 * Math.PI ** 2 * sigma ** 2 * f * f)),
    meanPerMm: 0.1,
    peakPerMm: 0.005,
    riseMm: null,
    blurFwhmMm: null,
  };
}

const square = (side: number): readonly PixelRun[] =>
  Array.from({ length: side }, (_, row) => ({ row: 40 + row, from: 30, end: 30 + side }));

describe('summedCovariance', () => {
  // n_eff = n / (1 + 2Σ(1 − j/n)φ^j) of a first-order autoregressive row: any textbook of time series.
  it.each([
    [0.5, 100, 33.783784],
    [0.9, 100, 5.813937],
    [0.5, 10, 3.845576],
  ])('gives the effective count of an autoregressive row, φ %d, n %d', (phi, n, effective) => {
    const sums = covarianceSums(128, (rows, columns) => (rows === 0 ? phi ** columns : 0));
    const total = summedCovariance([{ row: 3, from: 5, end: 5 + n }], sums) ?? 0;
    expect((n * n) / total).toBeCloseTo(effective, 5);
  });

  it('is the plain sum over all pairs of pixels, for any runs', () => {
    const covariance = (rows: number, columns: number): number =>
      Math.exp(-0.3 * rows - 0.2 * columns) * Math.cos(rows + 2 * columns);
    const runs = [
      { row: 0, from: 4, end: 5 },
      { row: 0, from: 7, end: 12 },
      { row: 2, from: 0, end: 9 },
      { row: 5, from: 3, end: 20 },
    ];
    const pixels = runs.flatMap(({ row, from, end }) =>
      Array.from({ length: end - from }, (_, index) => [row, from + index] as const),
    );
    let plain = 0;
    for (const [r, c] of pixels)
      for (const [s, d] of pixels) plain += covariance(Math.abs(r - s), Math.abs(c - d));
    expect(summedCovariance(runs, covarianceSums(32, covariance))).toBeCloseTo(plain, 9);
  });

  it('has no answer for a region that is wider than the autocovariance is known', () => {
    const sums = covarianceSums(8, () => 0);
    expect(summedCovariance([{ row: 0, from: 0, end: 10 }], sums)).toBeUndefined();
    expect(
      summedCovariance(
        [
          { row: 0, from: 0, end: 1 },
          { row: 9, from: 0, end: 1 },
        ],
        sums,
      ),
    ).toBeUndefined();
  });
});

describe('standardErrorOfMean', () => {
  // SD of the mean over 16 × 16 pixels by a Monte Carlo simulation, and what SD/√n would say.
  it.each([
    [1, 0.05792, 0.01762],
    [2, 0.05317, 0.00877],
  ])('is that of white noise after a Gaussian of %d pixels', (sigma, simulated, naive) => {
    const texture = smoothedWhite(sigma);
    const stated = standardErrorOfMean(square(16), texture, [1, 1], [0, 0, 0]) ?? 0;
    expect(Math.abs(stated / simulated - 1)).toBeLessThan(0.015);
    expect(texture.noiseSdHu / 16).toBeCloseTo(naive, 4);
  });

  it('is near σ√(4πσg²/n) for a region much larger than the correlation', () => {
    const stated = standardErrorOfMean(square(60), smoothedWhite(1), [1, 1], [0, 0, 0]) ?? 0;
    const large = 0.28209479 * Math.sqrt((4 * Math.PI) / 3600);
    expect(stated / large).toBeGreaterThan(0.95);
    expect(stated / large).toBeLessThan(1);
  });

  it('of one pixel is the SD of the noise', () => {
    const one = [{ row: 7, from: 9, end: 10 }];
    expect(standardErrorOfMean(one, smoothedWhite(2), [1, 1], [0, 0, 0])).toBeCloseTo(0.141, 3);
  });

  it('follows the pixels and not where they lie on the grid', () => {
    const runs = square(9);
    const moved = runs.map(({ row, from, end }) => ({
      row: row + 200,
      from: from + 100,
      end: end + 100,
    }));
    const texture = smoothedWhite(1.5);
    expect(standardErrorOfMean(moved, texture, [1, 1], [0, 0, 0])).toBe(
      standardErrorOfMean(runs, texture, [1, 1], [0, 0, 0]),
    );
  });

  it('is not there without pixels, nor for a region over 256 pixels', () => {
    const texture = smoothedWhite(1);
    expect(standardErrorOfMean([], texture, [1, 1], [0, 0, 0])).toBeUndefined();
    expect(
      standardErrorOfMean([{ row: 0, from: 0, end: 257 }], texture, [1, 1], [0, 0, 0]),
    ).toBeUndefined();
  });

  it('takes the noise of the areas near the region, the pooled one where they are far or unknown', () => {
    const places = [
      { centreMm: [0, 0, 0] as const, sdHu: 3 },
      { centreMm: [0, 0, 1000] as const, sdHu: 4 },
    ];
    const pooled = Math.sqrt(12.5);
    const texture = { ...smoothedWhite(1), noiseSdHu: pooled };
    expect(localNoiseShare(texture, [0, 0, 0])).toBe(1);
    expect(localNoiseShare({ ...texture, places }, [0, 0, 0])).toBeCloseTo(3 / pooled, 3);
    expect(localNoiseShare({ ...texture, places }, [0, 0, 500])).toBeCloseTo(1, 6);
    expect(localNoiseShare({ ...texture, places }, [9e6, 0, 0])).toBeCloseTo(1, 3);
  });
});

describe('textureCovariance', () => {
  it('is made once for a texture, a spacing and a size', () => {
    const texture = smoothedWhite(1);
    const first = textureCovariance(texture, [1, 1], 20);
    expect(textureCovariance(texture, [1, 1], 30)).toBe(first);
    expect(textureCovariance(texture, [1, 0.5], 30)).not.toBe(first);
    expect(textureCovariance({ ...texture }, [1, 1], 20)).not.toBe(first);
  });
});
