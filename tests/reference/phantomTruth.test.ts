import { describe, expect, it } from 'vitest';
import {
  demonstrationGrid,
  demonstrationTruth,
  firstPixelMm,
  makeSlice,
  pixelMm,
  RESCALE_INTERCEPT,
  trueRegions,
} from '../../core/phantom/index.js';

/** One slice through the stent's middle, as it is delivered; the truth is the scene that it was made from. */
const options = { seed: 1, slices: 1, matrix: 512 };
const grid = demonstrationGrid(options.matrix);
const [soft, sharp] = makeSlice(options, 0).map(({ bytes }) => {
  const stored = bytes.slice(-2 * options.matrix ** 2);
  return Float64Array.from(new Uint16Array(stored.buffer), (value) => value + RESCALE_INTERCEPT);
});

const measure = (
  image: Float64Array | undefined,
  id: string,
): { mean: number; sd: number; n: number } => {
  const region = trueRegions().find((one) => one.id === id);
  if (region === undefined || image === undefined) throw new Error(`no region: ${id}`);
  const { centreMm, radiiMm, u = [1, 0, 0], v = [0, 1, 0] } = region.shape;
  const [x0, y0] = firstPixelMm(grid);
  const values: number[] = [];
  image.forEach((value, pixel) => {
    const dx = x0 + (pixel % grid.matrix) * pixelMm(grid) - centreMm[0];
    const dy = y0 + Math.floor(pixel / grid.matrix) * pixelMm(grid) - centreMm[1];
    const a = (dx * u[0] + dy * u[1]) / radiiMm[0];
    const b = (dx * v[0] + dy * v[1]) / radiiMm[1];
    if (a * a + b * b <= 1) values.push(value);
  });
  const n = values.length;
  const mean = values.reduce((sum, value) => sum + value, 0) / n;
  const sd = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (n - 1));
  return { mean, sd, n };
};

describe('a slice of the demonstration', () => {
  it.each([
    ['R1', 370],
    ['R2', 350],
    ['R3', 200],
    ['R4', 100],
    ['F1', -90],
  ] as const)('meets the truth in %s within 3 HU on both kernels', (id, trueHu) => {
    expect(Math.abs(measure(soft, id).mean - trueHu)).toBeLessThan(3);
    expect(Math.abs(measure(sharp, id).mean - trueHu)).toBeLessThan(3);
  });

  it('has the noise that the truth file foretells, and at least 3 times as much on the sharp kernel', () => {
    const { expectedNoise } = demonstrationTruth(options);
    for (const id of ['R1', 'R2', 'R3']) {
      const expected = expectedNoise.find(({ region }) => region === id);
      if (expected === undefined) throw new Error(`no noise for: ${id}`);
      // A region of 2000 correlated pixels gives its SD to a few per cent; the soft kernel has the longer grain.
      expect(Math.abs(measure(soft, id).sd / expected.softSdHu - 1)).toBeLessThan(0.1);
      expect(Math.abs(measure(sharp, id).sd / expected.sharpSdHu - 1)).toBeLessThan(0.06);
    }
    expect(measure(sharp, 'R1').sd / measure(soft, 'R1').sd).toBeGreaterThan(3);
    expect(measure(soft, 'R1').sd).toBeGreaterThan(10);
    expect(measure(soft, 'R1').sd).toBeLessThan(20);
  });

  it('reads the lumen in the stent far too high on the soft kernel, and nearer the truth on the sharp one', () => {
    const { mean, n } = measure(soft, 'L1');
    expect(n).toBeGreaterThan(15);
    expect(mean).toBeGreaterThan(350 + 120);
    const excess = measure(sharp, 'L1').mean - 350;
    expect(Math.abs(excess)).toBeLessThan((mean - 350) / 2);
  });
});

describe('demonstrationTruth', () => {
  it('lists the regions that lie in its slices, and says that it is synthetic', () => {
    const truth = demonstrationTruth(options);
    expect(truth.regions.map(({ id }) => id)).toEqual(['R1', 'R2', 'R3', 'R4', 'F1', 'L1']);
    expect(truth.contrasts).toEqual([]);
    expect(truth.statement).toContain('SYNTHETIC');
    expect(truth.slices.map(({ zMm }) => zMm)).toEqual([10]);
    const [stent] = truth.stents;
    // π(1.6² − 1.5²) · (5600 − 350), by hand.
    expect(stent?.massHuMm2).toBeCloseTo(5112.9, 1);
    expect(truth.slices[0]?.objects.tissues.at(-1)).toEqual({
      name: 'lumen in the stent',
      hu: 350,
      centreMm: [56, -50, 10],
      radiiMm: [1.5, 1.5],
      angleDeg: 0,
    });
  });
});
