/**
 * Sub-pixel shifts against scikit-image's phase_cross_correlation (Guizar-Sicairos et al. 2008) on the same images, and
 * against known shifts of phantom slices: the scene is moved, not the pixels, and the noise is another one.
 */
import { describe, expect, it } from 'vitest';
import type { StoredValues } from '../../core/dicom/index.js';
import { makeSpectrumMaker } from '../../core/pairing/gradientSpectrum.js';
import { measureShift } from '../../core/pairing/index.js';
import { peakShift } from '../../core/pairing/peakShift.js';
import {
  addQuantumNoise,
  demonstrationScene,
  KERNELS,
  type Kernel,
  type ParallelScan,
  projectSlice,
  reconstructHu,
  type SceneSlice,
  seededUniform,
} from '../../core/phantom/index.js';
import type { Stack } from '../../core/stack/index.js';
import { pythonHas, pythonJson } from '../support/python.js';
import { stackOf } from '../unit/core/pairing/stackFixture.js';

const PROGRAM = `
import json
import numpy as np
from scipy.ndimage import fourier_shift, gaussian_filter
from skimage.registration import phase_cross_correlation
rng = np.random.default_rng(7)
cases = []
for shift in [(0, 0), (0.3, -0.6), (1.25, 0.5), (-2.9, 2.1)]:
    scene = gaussian_filter(rng.normal(0, 1, (128, 128)), 2, mode="wrap")
    scene *= 300 / scene.std()
    moved = np.real(np.fft.ifft2(fourier_shift(np.fft.fft2(scene), shift)))
    soft = gaussian_filter(scene, 1.2, mode="wrap") + gaussian_filter(rng.normal(0, 30, scene.shape), 1, mode="wrap")
    sharp = gaussian_filter(moved, 0.5, mode="wrap") + rng.normal(0, 30, scene.shape)
    back, _, _ = phase_cross_correlation(soft, sharp, upsample_factor=100, normalization=None)
    cases.append({"true": shift, "skimage": (-back).tolist(),
                  "soft": soft.round(2).ravel().tolist(), "sharp": sharp.round(2).ravel().tolist()})
print(json.dumps(cases))
`;

interface Case {
  readonly true: readonly [number, number];
  readonly skimage: readonly [number, number];
  readonly soft: readonly number[];
  readonly sharp: readonly number[];
}

const available = pythonHas('numpy', 'scipy', 'skimage');

describe.skipIf(!available)(
  available
    ? 'peakShift beside scikit-image'
    : 'peakShift beside scikit-image (SKIPPED: install python3-skimage to run it)',
  () => {
    it('finds the same shift on noisy images of two kernels, within 0.05 px of it and of the truth', () => {
      const maker = makeSpectrumMaker(128);
      for (const one of pythonJson(PROGRAM) as readonly Case[]) {
        const [first, second] = [one.soft, one.sharp].map((values) =>
          maker.gradientSpectrum(Float64Array.from(values)),
        );
        if (first === undefined || second === undefined) throw new Error('no spectra');
        const found = peakShift([{ first, second }], maker, 16);
        const [row, column] = [found?.row ?? Number.NaN, found?.column ?? Number.NaN];
        expect(Math.hypot(row - one.true[0], column - one.true[1])).toBeLessThan(0.05);
        expect(Math.hypot(row - one.skimage[0], column - one.skimage[1])).toBeLessThan(0.05);
      }
    });
  },
);

/** Half the views of the demonstration's scan, with as many photons in all. */
const SCAN: ParallelScan = {
  views: 360,
  detectors: 1024,
  pitchMm: 0.35,
  blurSigmaMm: 0.18,
  waterPerMm: 0.02059,
};
const PHOTONS = 3.2e5;
const CENTRE_MM = [24, -14] as const;

/** Reads a fixture stack as slices of the demonstration's scene, moved. */
function phantomReader(kernel: Kernel, seed: number, [dx, dy]: readonly [number, number]) {
  const drawn = new Map<number, StoredValues>();
  return (stack: Stack, index: number): StoredValues => {
    const known = drawn.get(index);
    if (known !== undefined) return known;
    const slice = stack.slices[index];
    if (slice === undefined) throw new RangeError(`no slice: ${index}`);
    const { grid } = slice.image;
    const matrix = grid.columns;
    const fieldOfViewMm = matrix * grid.pixelSpacingMm[1];
    const back = ((matrix - 1) / 2) * grid.pixelSpacingMm[1];
    // The fixture lies around (0, 0): the scene is moved so that its heart does too.
    const scene = moved(
      demonstrationScene(10 + slice.alongMm),
      dx - CENTRE_MM[0],
      dy - CENTRE_MM[1],
    );
    const noisy = addQuantumNoise(
      projectSlice(scene, SCAN),
      PHOTONS,
      seededUniform(seed, Math.round(slice.alongMm * 1000)),
    );
    const centreMm = [grid.positionMm[0] + back, grid.positionMm[1] + back] as const;
    const hu = reconstructHu(noisy, SCAN, kernel, { centreMm, fieldOfViewMm, matrix });
    const stored = Int16Array.from(hu, (value) => Math.round(value + 1024));
    drawn.set(index, stored);
    return stored;
  };
}

function moved({ painted, insets }: SceneSlice, dx: number, dy: number): SceneSlice {
  const move = <T extends { readonly centreMm: readonly [number, number] }>(one: T): T => ({
    ...one,
    centreMm: [one.centreMm[0] + dx, one.centreMm[1] + dy],
  });
  return { painted: painted.map(move), insets: insets.map(move) };
}

describe('measureShift on phantom slices', () => {
  const soft = stackOf({ series: 1, slices: 9, matrix: 320 });
  const readSoft = phantomReader(KERNELS.soft, 1, [0, 0]);
  /** The fixture's pixel. */
  const PIXEL_MM = 0.4;

  it.each([
    { name: 'none', px: [0, 0], seed: 2, sharp: { series: 2, slices: 9, matrix: 320 } },
    {
      name: '0.3 and −0.6 px',
      px: [0.3, -0.6],
      seed: 2,
      sharp: { series: 2, slices: 9, matrix: 320 },
    },
    { name: '3 and 1.4 px', px: [3, 1.4], seed: 2, sharp: { series: 2, slices: 9, matrix: 320 } },
    {
      // One acquisition: where slices of both lie at one height, their noise is the same.
      name: 'none in another field and increment',
      px: [0, 0],
      seed: 1,
      sharp: { series: 2, slices: 11, spacingMm: 0.4, matrix: 288 },
    },
  ])(
    'recovers $name within 0.05 px, soft against sharp',
    async ({ px, seed, sharp }) => {
      const [x = 0, y = 0] = px.map((value) => value * PIXEL_MM);
      const other = stackOf(sharp);
      const readSharp = phantomReader(KERNELS.sharp, seed, [x, y]);
      const found = await measureShift(soft, other, async (stack, index) =>
        stack === soft ? readSoft(stack, index) : readSharp(stack, index),
      );
      const error = [
        (found.shiftMm?.[0] ?? Number.NaN) - x,
        (found.shiftMm?.[1] ?? Number.NaN) - y,
      ];
      expect(Math.max(...error.map(Math.abs)) / PIXEL_MM).toBeLessThan(0.05);
    },
    90_000,
  );
});
