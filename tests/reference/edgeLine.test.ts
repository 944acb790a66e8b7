import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import type { StoredValues } from '../../core/dicom/index.js';
import { type BandLine, measureEdgeLine } from '../../core/region/index.js';
import { axial, sampleStack } from '../unit/renderer/sample.js';

const PYTHON = '/usr/bin/python3';
const has = spawnSync(PYTHON, ['-c', 'import numpy, scipy.ndimage, scipy.optimize']).status === 0;

/**
 * Steps that scipy blurs on a grid seven times finer than the pixels, and its own least-squares fit of an error
 * function to the same pixels; noise smoothed by its filter.
 */
const SCRIPT = `
import sys, json, numpy
from scipy.ndimage import gaussian_filter
from scipy.optimize import curve_fit
from scipy.special import erf
folder = sys.argv[1]
random = numpy.random.default_rng(20260110)
N, F, PX = 80, 7, 0.35
fine = PX / F
x = (numpy.arange(N * F) - N * F / 2 + 0.5) * fine
X, Y = numpy.meshgrid(x, x)
cases = []
for sigma, lean, noise, grain in [(0.5, 0.0, 0, 0), (0.5, 0.35, 0, 0), (0.8, -0.5, 0, 0), (0.5, 0.2, 12, 0.3), (0.8, 0.1, 25, 0.5)]:
    for draw in range(24 if noise else 1):
        step = 400.0 * (X * numpy.cos(lean) + Y * numpy.sin(lean) > 0)
        image = gaussian_filter(step, sigma / fine)[F // 2::F, F // 2::F]
        if noise:
            field = gaussian_filter(random.standard_normal((N, N)), grain / PX)
            image = image + noise * field / field.std()
        stored = numpy.rint(image * 10).astype('<i2')
        name = f'{len(cases)}'
        stored.tofile(folder + '/' + name)
        centre = (N / 2 - 0.5) * PX
        axis = numpy.arange(N) * PX - centre
        x0 = x[F // 2] + centre
        T, S = numpy.meshgrid(axis, axis)
        keep = (abs(T) <= 5) & (abs(S) <= 2)
        values = stored[keep] / 10.0
        model = lambda ts, low, high, at, sl, sg: low + high * 0.5 * (1 + erf((ts[0] - at - sl * ts[1]) / (abs(sg) * numpy.sqrt(2 * (1 + sl * sl)))))
        fit, _ = curve_fit(model, (T[keep], S[keep]), values, p0=(0, 400, 0, 0, 0.6))
        cases.append(dict(name=name, sigma=sigma, noise=noise, grain=grain, fitted=abs(fit[4])))
json.dump(cases, open(folder + '/cases.json', 'w'))
`;

interface Case {
  readonly name: string;
  readonly sigma: number;
  readonly noise: number;
  readonly fitted: number;
}

const SIDE = 80;
const PX = 0.35;
const RISE_PER_SIGMA = 2.5631031;

describe.skipIf(!has)(
  `edge lines against scipy${has ? '' : ' (skipped: /usr/bin/python3 has no scipy)'}`,
  () => {
    const folder = mkdtempSync(join(tmpdir(), 'diptych-edge-'));
    afterAll(() => rmSync(folder, { recursive: true, force: true }));
    if (has) execFileSync(PYTHON, ['-c', SCRIPT, folder]);
    const cases: readonly Case[] = has
      ? JSON.parse(readFileSync(join(folder, 'cases.json'), 'utf8'))
      : [];
    const stack = sampleStack({
      positionsMm: axial(1, 1),
      rows: SIDE,
      columns: SIDE,
      pixelSpacingMm: [PX, PX],
      sliceSpacingMm: 1,
    });
    const tenths = {
      ...stack,
      slices: [
        {
          ...stack.slices[0],
          image: {
            ...stack.slices[0].image,
            pixels: { ...stack.slices[0].image.pixels, rescale: { slope: 0.1, intercept: 0 } },
          },
        },
      ] as const,
    };
    const middle = (SIDE / 2 - 0.5) * PX;
    const line: BandLine = {
      fromMm: [-10 + middle - 5, -20 + middle, 0],
      toMm: [-10 + middle + 5, -20 + middle, 0],
      bandMm: 4,
    };
    const measured = cases.map((one) => {
      const bytes = readFileSync(join(folder, one.name));
      const stored: StoredValues = new Int16Array(bytes.buffer, bytes.byteOffset, SIDE * SIDE);
      return { ...one, value: measureEdgeLine(line, tenths, () => stored) };
    });

    it('measure the blur that scipy made, slanted or not, within half a percent', () => {
      for (const { sigma, noise, value } of measured.filter((one) => one.noise === 0)) {
        expect(noise).toBe(0);
        // The fine grid itself blurs by 0.05 mm / √12, a ten-thousandth of σ.
        expect((value.riseMm ?? 0) / (RISE_PER_SIGMA * sigma)).toBeCloseTo(1, 2);
        expect((value.blurFwhmMm ?? 0) / (2.3548200450309493 * sigma)).toBeCloseTo(1, 2);
      }
    });

    it('agree with scipy’s fit of an error function to the same noisy pixels', () => {
      for (const { fitted, value } of measured.filter((one) => one.noise > 0)) {
        // Ours follows a bend of the edge too, which noise moves: by less than its own standard error.
        const apart = Math.abs((value.riseMm ?? 0) - RISE_PER_SIGMA * fitted);
        expect(apart).toBeLessThan(0.5 * (value.riseErrorMm ?? 0));
      }
    });

    it.each([0.5, 0.8])(
      'state the spread of 24 draws of noise as their standard error, σ %s mm',
      (sigma) => {
        const draws = measured.filter((one) => one.sigma === sigma && one.noise > 0);
        const rises = draws.map(({ value }) => value.riseMm ?? Number.NaN);
        const mean = rises.reduce((sum, rise) => sum + rise, 0) / rises.length;
        const spread = Math.sqrt(
          rises.reduce((sum, rise) => sum + (rise - mean) ** 2, 0) / (rises.length - 1),
        );
        const stated = Math.sqrt(
          draws.reduce((sum, { value }) => sum + (value.riseErrorMm ?? 0) ** 2, 0) / draws.length,
        );
        // An SD of 24 draws is itself known to 15 %; the covariance taken from residuals is low by some tenths.
        expect(stated / spread).toBeGreaterThan(0.55);
        expect(stated / spread).toBeLessThan(1.5);
        expect(Math.abs(mean / (RISE_PER_SIGMA * sigma) - 1)).toBeLessThan(0.04);
      },
    );
  },
);
