import { describe, expect, it } from 'vitest';
import {
  type Apodisation,
  apodisation,
  backProject,
  backProjectPair,
  chordMm,
  expectedNoiseHu,
  filterSinogram,
  type ImageGrid,
  type Inset,
  kernelTaps,
  normalSource,
  type ParallelScan,
  projectSlice,
  reconstructHu,
  seededUniform,
} from '../../core/phantom/index.js';
import { makeFft } from '../../core/quality/fft.js';

/**
 * The modified Shepp–Logan head: value, half axes, centre, angle (Toft 1996; the values of two public tables of it).
 * Lengths are in mm here, with the head 2 mm high.
 */
const SHEPP_LOGAN: readonly (readonly [number, number, number, number, number, number])[] = [
  [1, 0.69, 0.92, 0, 0, 0],
  [-0.8, 0.6624, 0.874, 0, -0.0184, 0],
  [-0.2, 0.11, 0.31, 0.22, 0, -18],
  [-0.2, 0.16, 0.41, -0.22, 0, 18],
  [0.1, 0.21, 0.25, 0, 0.35, 0],
  [0.1, 0.046, 0.046, 0, 0.1, 0],
  [0.1, 0.046, 0.046, 0, -0.1, 0],
  [0.1, 0.046, 0.023, -0.08, -0.605, 0],
  [0.1, 0.023, 0.023, 0, -0.606, 0],
  [0.1, 0.023, 0.046, 0.06, -0.605, 0],
];

const headIntegral = (thetaDeg: number, t: number): number =>
  SHEPP_LOGAN.reduce((sum, [value, a, b, x, y, angleDeg]) => {
    const ellipse = { centreMm: [x, y], radiiMm: [a, b], angleDeg } as const;
    return sum + value * chordMm(ellipse, (thetaDeg * Math.PI) / 180, t);
  }, 0);

describe('line integrals of the modified Shepp–Logan head', () => {
  // Computed from 2Aab·√(a′² − d²)/a′² (Kak & Slaney 1988 chapter 3) in a program of its own.
  it.each([
    [0, 0.5146, 0.430893075, 0.330818335],
    [30, 0.393450644, 0.391490238, 0.373119489],
    [45, 0.24274703, 0.362115415, 0.360886137],
    [90, 0.207675958, 0.223119068, 0.315578499],
    [135, 0.269436223, 0.340086918, 0.33761627],
  ])('at %d° agree at t = 0, 0.1 and 0.3', (thetaDeg, ...expected) => {
    [0, 0.1, 0.3].forEach((t, index) => {
      expect(headIntegral(thetaDeg, t)).toBeCloseTo(expected[index] ?? Number.NaN, 8);
    });
  });

  it('add up to the integral of the image at each angle', () => {
    // Σ πabA = 0.495264605.
    for (const thetaDeg of [0, 30, 71, 90, 135]) {
      let sum = 0;
      for (let step = 0; step < 20_000; step += 1)
        sum += headIntegral(thetaDeg, -1 + step / 10_000);
      expect(sum / 10_000).toBeCloseTo(0.495264605, 5);
    }
  });
});

const nyquist = (name: Apodisation) => ({ apodisation: name, cutOffPerMm: 0.5 });

describe('taps of the kernels at a pitch of 1 mm', () => {
  it('are those of Ram–Lak: 1/4, −1/(nπ)² at odd n, 0 at even n (Kak & Slaney eq. 61)', () => {
    const taps = kernelTaps(nyquist('ram-lak'), 1, 4096);
    const expected = [0.25, -0.101321184, 0, -0.011257909, 0, -0.004052847];
    expected.forEach((value, n) => {
      expect(taps[n]).toBeCloseTo(value, 6);
    });
  });

  it('are those of Shepp–Logan: −2/(π²(4n² − 1)) (Shepp & Logan 1974)', () => {
    const taps = kernelTaps(nyquist('shepp-logan'), 1, 4096);
    const expected = [0.202642367, -0.067547456, -0.013509491, -0.005789782];
    expected.forEach((value, n) => {
      expect(taps[n]).toBeCloseTo(value, 6);
    });
  });
});

describe('apodisation', () => {
  it('is 1 at frequency 0 and nothing beyond the cut-off', () => {
    for (const name of ['ram-lak', 'shepp-logan', 'cosine', 'hann', 'hamming'] as const) {
      expect(apodisation(nyquist(name), 0)).toBe(1);
      expect(apodisation(nyquist(name), 0.51)).toBe(0);
    }
  });

  it('is 1, 2√2/π, 1/√2, 1/2 and 0.54 at half the cut-off', () => {
    const half = (name: Apodisation) => apodisation(nyquist(name), 0.25);
    expect(half('ram-lak')).toBe(1);
    expect(half('shepp-logan')).toBeCloseTo((2 * Math.SQRT2) / Math.PI, 12);
    expect(half('cosine')).toBeCloseTo(Math.SQRT1_2, 12);
    expect(half('hann')).toBeCloseTo(0.5, 12);
    expect(half('hamming')).toBeCloseTo(0.54, 12);
  });
});

const noiseScan: ParallelScan = {
  views: 180,
  detectors: 256,
  pitchMm: 1,
  blurSigmaMm: 0,
  waterPerMm: 0.02,
};
const noiseGrid: ImageGrid = { centreMm: [0, 0], fieldOfViewMm: 128, matrix: 128 };

const whiteNoise = (): Float64Array => {
  const normal = normalSource(seededUniform(17));
  return Float64Array.from({ length: noiseScan.views * noiseScan.detectors }, normal);
};

const sd = (values: Float64Array): number => {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  return Math.sqrt(
    values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1),
  );
};

describe('noise of filtered back projection', () => {
  // σ² = π²σp²/(Mτ²)·c; c by filter from the same closed integrals as the table: ∫f²W² df.
  const TABLE = [
    ['ram-lak', 0.083333, 1],
    ['shepp-logan', 0.050661, 0.779697],
    ['cosine', 0.016336, 0.44276],
    ['hamming', 0.009288, 0.333858],
    ['hann', 0.007503, 0.300057],
  ] as const;

  it.each(TABLE)('of the %s filter follows Σh² = %d', (name, constant, ratio) => {
    const own = kernelTaps(nyquist(name), 1, 4096).reduce((sum, tap) => sum + tap * tap, 0);
    expect(own).toBeCloseTo(constant, 5);
    const ramLak = kernelTaps(nyquist('ram-lak'), 1, 4096).reduce((sum, tap) => sum + tap * tap, 0);
    expect(Math.sqrt(own / ramLak)).toBeCloseTo(ratio, 4);
  });

  it('has on a detector’s own place the variance π²/(12·180) = 0.0045692613 for Ram–Lak', () => {
    // A pixel at the axis lies on a detector in every view when the number of detectors is odd: no interpolation.
    const scan = { ...noiseScan, detectors: 255 };
    const flat = new Float64Array(scan.views * scan.detectors);
    const noise = expectedNoiseHu(flat, scan, nyquist('ram-lak'), 1, [0, 0]);
    expect(((noise * scan.waterPerMm) / 1000) ** 2).toBeCloseTo(0.0045692613, 6);
  });

  it.each(TABLE)(
    'is in an image of the %s filter what the taps and the interpolation say',
    (name) => {
      const image = backProject(
        filterSinogram(whiteNoise(), noiseScan, nyquist(name)),
        noiseScan,
        noiseGrid,
      );
      const flat = new Float64Array(noiseScan.views * noiseScan.detectors);
      let variance = 0;
      for (let place = 0; place < 64; place += 1) {
        const noise = expectedNoiseHu(flat, noiseScan, nyquist(name), 1, [
          ((place % 8) - 3.6) * 14.3,
          (Math.floor(place / 8) - 3.4) * 14.7,
        ]);
        variance += ((noise * noiseScan.waterPerMm) / 1000) ** 2 / 64;
      }
      // 16,384 correlated pixels: the SD of one such image is good to about 1 %.
      expect(sd(image) / Math.sqrt(variance)).toBeCloseTo(1, 1);
      expect(Math.abs(sd(image) / Math.sqrt(variance) - 1)).toBeLessThan(0.03);
    },
  );
});

describe('noise power spectrum of filtered back projection', () => {
  // NPS ∝ f·W² (Riederer, Pelc & Chesler 1978; from memory). The interpolation is the same for all filters.
  const fft = makeFft(128);
  const power = (name: Apodisation): readonly number[] => {
    const image = backProject(
      filterSinogram(whiteNoise(), noiseScan, nyquist(name)),
      noiseScan,
      noiseGrid,
    );
    const rows = Array.from({ length: 128 }, (_, row) => {
      const re = image.slice(row * 128, row * 128 + 128);
      const im = new Float64Array(128);
      fft.forward(re, im);
      return { re, im };
    });
    const sums = new Float64Array(64);
    const counts = new Float64Array(64);
    for (let column = 0; column < 128; column += 1) {
      const re = Float64Array.from(rows, (row) => row.re[column] ?? Number.NaN);
      const im = Float64Array.from(rows, (row) => row.im[column] ?? Number.NaN);
      fft.forward(re, im);
      for (let row = 0; row < 128; row += 1) {
        const radius = Math.round(
          Math.hypot(Math.min(column, 128 - column), Math.min(row, 128 - row)),
        );
        if (radius >= 64) continue;
        sums[radius] = (sums[radius] ?? 0) + (re[row] ?? 0) ** 2 + (im[row] ?? 0) ** 2;
        counts[radius] = (counts[radius] ?? 0) + 1;
      }
    }
    return Array.from(sums, (sum, radius) => sum / (counts[radius] ?? 1));
  };

  it('differs between two filters on the same noise by the square of their W', () => {
    const hann = power('hann');
    const cosine = power('cosine');
    for (const bin of [8, 16, 24, 32, 40]) {
      const frequency = bin / 128;
      const expected =
        (apodisation(nyquist('hann'), frequency) / apodisation(nyquist('cosine'), frequency)) ** 2;
      expect((hann[bin] ?? 0) / (cosine[bin] ?? 0) / expected).toBeCloseTo(1, 1);
    }
  });

  it('grows in proportion to f at low frequencies', () => {
    const spectrum = power('ram-lak');
    const mean = (from: number, to: number): number =>
      spectrum.slice(from, to).reduce((sum, value) => sum + value, 0) / (to - from);
    // Middles of the bands are bins 8 and 16; at bin 16 the interpolation's sinc⁴ takes 3.5 % away (bin 8: 0.9 %).
    expect(mean(14, 19) / mean(6, 11)).toBeGreaterThan(1.75);
    expect(mean(14, 19) / mean(6, 11)).toBeLessThan(2.2);
  });
});

const disc = (radius: number, hu: number, x = 0, y = 0): Inset => ({
  name: 'disc',
  centreMm: [x, y],
  radiiMm: [radius, radius],
  angleDeg: 0,
  hu,
  aroundHu: -1000,
});

describe('reconstruction of a disc', () => {
  const scan: ParallelScan = {
    views: 180,
    detectors: 160,
    pitchMm: 0.5,
    blurSigmaMm: 0,
    waterPerMm: 0.02,
  };
  const grid: ImageGrid = { centreMm: [0, 0], fieldOfViewMm: 30, matrix: 61 };

  it('is flat to 0.2 % and right in its middle for all filters', () => {
    const sinogram = projectSlice({ painted: [disc(20, 0)], insets: [] }, scan);
    for (const name of ['ram-lak', 'shepp-logan', 'cosine', 'hann', 'hamming'] as const) {
      const kernel = { apodisation: name, cutOffPerMm: 1 };
      const hu = reconstructHu(sinogram, scan, kernel, grid);
      const middle: number[] = [];
      for (let row = 10; row <= 50; row += 1)
        for (let column = 10; column <= 50; column += 1)
          middle.push(hu[row * 61 + column] ?? Number.NaN);
      // Known for this case from a program of its own: .0199875 (Ram–Lak), .0200149 (Shepp–Logan) of .02 in the centre.
      expect(Math.abs(hu[30 * 61 + 30] ?? Number.NaN)).toBeLessThan(1.5);
      const mean = middle.reduce((sum, value) => sum + value, 0) / middle.length;
      expect(Math.abs(mean)).toBeLessThan(1);
      expect(Math.max(...middle.map((value) => Math.abs(value - mean)))).toBeLessThan(
        name === 'ram-lak' ? 6 : 2,
      );
    }
  });

  it('lies where the grid says, in an oblong place beside the axis', () => {
    const sinogram = projectSlice({ painted: [], insets: [disc(2, 0, 9, -5)] }, scan);
    const hu = reconstructHu(sinogram, scan, { apodisation: 'hann', cutOffPerMm: 1 }, grid);
    let mass = 0;
    let x = 0;
    let y = 0;
    hu.forEach((value, pixel) => {
      const weight = value + 1000;
      mass += weight;
      x += weight * (((pixel % 61) - 30) * (30 / 61));
      y += weight * ((Math.floor(pixel / 61) - 30) * (30 / 61));
    });
    expect(x / mass).toBeCloseTo(9, 1);
    expect(y / mass).toBeCloseTo(-5, 1);
    // Mass of the disc: 1000·π·2² HU·mm², to 2 %.
    expect((mass * (30 / 61) ** 2) / (4000 * Math.PI)).toBeCloseTo(1, 1);
  });

  it('is linear: the sum of two sinograms gives the sum of two images', () => {
    const a = projectSlice({ painted: [], insets: [disc(6, 0, 2, 3)] }, scan);
    const b = projectSlice({ painted: [], insets: [disc(3, 500, -4, 1)] }, scan);
    const kernel = { apodisation: 'cosine', cutOffPerMm: 0.9 } as const;
    const image = (sinogram: Float64Array) =>
      backProject(filterSinogram(sinogram, scan, kernel), scan, grid);
    const both = image(a.map((value, index) => value + 2 * (b[index] ?? 0)));
    const imageA = image(a);
    const imageB = image(b);
    both.forEach((value, pixel) => {
      expect(value).toBeCloseTo((imageA[pixel] ?? 0) + 2 * (imageB[pixel] ?? 0), 12);
    });
  });

  it('is the same for two kernels at once, inside the detectors and beyond them', () => {
    const sinogram = projectSlice({ painted: [disc(20, 0, 3, 2)], insets: [] }, scan);
    const [a, b] = (['hann', 'ram-lak'] as const).map((name) =>
      filterSinogram(sinogram, scan, { apodisation: name, cutOffPerMm: 0.9 }),
    );
    if (a === undefined || b === undefined) throw new Error('no filtered views');
    for (const fieldOfViewMm of [30, 90]) {
      const place: ImageGrid = { centreMm: [1, -2], fieldOfViewMm, matrix: 61 };
      const pair = backProjectPair(a, b, scan, place);
      for (const [index, filtered] of [a, b].entries()) {
        const alone = backProject(filtered, scan, place);
        const largest = alone.reduce(
          (most, value, pixel) =>
            Math.max(most, Math.abs(value - (pair[index]?.[pixel] ?? Number.NaN))),
          0,
        );
        expect(largest).toBeLessThan(1e-12);
      }
    }
  });

  it('gives a pixel that no detector sees nothing, and does not fail', () => {
    const sinogram = projectSlice({ painted: [disc(20, 0)], insets: [] }, scan);
    const wide: ImageGrid = { centreMm: [0, 0], fieldOfViewMm: 200, matrix: 50 };
    const hu = reconstructHu(sinogram, scan, { apodisation: 'hann', cutOffPerMm: 1 }, wide);
    expect(hu.every(Number.isFinite)).toBe(true);
    expect(Math.abs(hu[25 * 50 + 25] ?? Number.NaN)).toBeLessThan(5);
  });
});
