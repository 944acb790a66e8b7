import { describe, expect, it } from 'vitest';
import { type EdgeSamples, edgeOfLine } from '../../../../core/quality/index.js';
import { gaussianStep } from '../../../corpus/edgePair.js';

const PIXEL_MM = 0.35;

interface Scene {
  readonly sigmaMm?: number;
  /** Between the line and the normal of the edge, radians. */
  readonly angle?: number;
  readonly atMm?: number;
  readonly lengthMm?: number;
  readonly bandMm?: number;
  readonly hu?: (across: number, t: number) => number;
}

/** Pixels of a band that lies aslant on the pixel grid, with a step of 400 HU on −50 by default. */
function samples(scene: Scene): EdgeSamples {
  const { sigmaMm = 0.6, angle = 0, atMm = 0, lengthMm = 10, bandMm = 4 } = scene;
  const hu = scene.hu ?? ((across: number) => -50 + 400 * gaussianStep(across / sigmaMm));
  const rows: [number, number, number][] = [];
  for (let row = -40; row <= 40; row += 1)
    for (let column = -40; column <= 40; column += 1) {
      const [x, y] = [(column + 0.3) * PIXEL_MM, (row + 0.1) * PIXEL_MM];
      const t = x * Math.cos(0.2) + y * Math.sin(0.2);
      const s = y * Math.cos(0.2) - x * Math.sin(0.2);
      if (Math.abs(t) > lengthMm / 2 || Math.abs(s) > bandMm / 2) continue;
      const across = (t - atMm) * Math.cos(angle) + s * Math.sin(angle);
      rows.push([t, s, hu(across, t)]);
    }
  return {
    acrossMm: Float64Array.from(rows, ([t]) => t),
    alongMm: Float64Array.from(rows, ([, s]) => s),
    hu: Float64Array.from(rows, ([, , value]) => value),
  };
}

function measured(scene: Scene) {
  const { lengthMm = 10, bandMm = 4 } = scene;
  return edgeOfLine(samples(scene), { lengthMm, bandMm, pixelMm: PIXEL_MM });
}

function codeOf(scene: Scene): string {
  const result = measured(scene);
  return result.ok ? 'ok' : result.refusal.code;
}

/** 10–90 % of a Gaussian-blurred step lie 2 · 1.2815516 σ apart: tables of the normal distribution. */
const RISE_PER_SIGMA = 2.5631031;

describe('The edge along a line', () => {
  it.each([
    [0.2, 0],
    [0.3, 0.3],
    [0.6, 0],
    [0.6, -0.6],
    [0.9, 0.5],
  ])(
    'has the rise distance of its blur, σ %s mm, at right angles to an edge slanted by %s',
    (sigmaMm, angle) => {
      const result = measured({ sigmaMm, angle, atMm: 0.7 });
      if (!result.ok) throw new Error(result.refusal.text);
      // Φ of the fit is wrong by less than 1e-7 (Abramowitz & Stegun 7.1.26).
      expect(result.value.riseMm / (RISE_PER_SIGMA * sigmaMm)).toBeCloseTo(1, 5);
      expect(result.value.atMm).toBeCloseTo(5.7, 5);
      expect(result.value.angleDeg).toBeCloseTo((Math.abs(angle) * 180) / Math.PI, 3);
      expect(result.value.fromHu).toBeCloseTo(-50, 3);
      expect(result.value.toHu).toBeCloseTo(350, 3);
      // Gathering pixels in steps of a third of σ, at least 0.1 mm, widens the profile by a few percent.
      expect((result.value.crossingsMm ?? 0) / result.value.riseMm).toBeGreaterThan(0.98);
      expect((result.value.crossingsMm ?? 0) / result.value.riseMm).toBeLessThan(1.06);
    },
  );

  it('may fall as well as rise', () => {
    const result = measured({ hu: (across) => 500 - 300 * gaussianStep(across / 0.5) });
    if (!result.ok) throw new Error(result.refusal.text);
    expect(result.value.riseMm).toBeCloseTo(0.5 * RISE_PER_SIGMA, 5);
    expect([result.value.fromHu, result.value.toHu].map(Math.round)).toEqual([500, 200]);
  });

  it('is the same for an edge that is bent like the wall of a vessel', () => {
    // A circle of 6 mm radius. At the border of the band it leans by 19° from the line, so that a distance along the
    // line is 6 % longer there than one at right angles; the mean of that over the band stays.
    const line = samples({ hu: () => 0 });
    const hu = line.acrossMm.map((t, index) => {
      const away = 6 - Math.hypot(t + 6, line.alongMm[index] ?? 0);
      return 400 * gaussianStep(away / 0.6);
    });
    const result = edgeOfLine({ ...line, hu }, { lengthMm: 10, bandMm: 4, pixelMm: PIXEL_MM });
    if (!result.ok) throw new Error(result.refusal.text);
    expect(result.value.riseMm / (0.6 * RISE_PER_SIGMA)).toBeGreaterThan(1);
    expect(result.value.riseMm / (0.6 * RISE_PER_SIGMA)).toBeLessThan(1.03);
  });

  it('has long tails told apart: the profile crosses 10 and 90 % farther apart than the plain blur that fits best', () => {
    const tailed = (across: number): number => 400 * (0.5 + Math.atan(across / 0.3) / Math.PI);
    const result = measured({ hu: tailed });
    if (!result.ok) throw new Error(result.refusal.text);
    expect((result.value.crossingsMm ?? 0) / result.value.riseMm).toBeGreaterThan(1.08);
  });

  it.each<[string, string, Scene]>([
    ['no-step', 'without a step', { hu: () => 40 }],
    ['no-step', 'on a step of 10 HU', { hu: (across) => 10 * gaussianStep(across / 0.5) }],
    ['few-pixels', 'of fewer than 40 pixels', { lengthMm: 2, bandMm: 1 }],
    ['too-short', 'that ends in the rise', { lengthMm: 3, sigmaMm: 0.9 }],
    ['too-short', 'that begins just before the edge', { atMm: -4.6 }],
    ['along-edge', 'that runs along the edge', { angle: 1.2, bandMm: 10 }],
    ['narrower-than-pixels', 'over a step without blur', { sigmaMm: 0.03, angle: 0.2 }],
    [
      'several-edges',
      'over a vessel from wall to wall',
      { hu: (_, t) => 400 * (gaussianStep((t + 2) / 0.5) - gaussianStep((t - 2) / 0.5)) },
    ],
    [
      'uneven-sides',
      'with a third level beside the edge',
      {
        lengthMm: 16,
        hu: (_, t) => 400 * gaussianStep((t + 1) / 0.4) + 160 * gaussianStep((t - 4) / 0.4),
      },
    ],
  ])('is refused as %s %s', (code, _, scene) => {
    expect(codeOf(scene)).toBe(code);
  });

  it('is refused where noise hides it', () => {
    let state = 7;
    const noisy = samples({}).hu.map((hu) => {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      return hu + 3000 * (state / 2 ** 32 - 0.5);
    });
    const result = edgeOfLine(
      { ...samples({}), hu: noisy },
      { lengthMm: 10, bandMm: 4, pixelMm: PIXEL_MM },
    );
    expect(result.ok).toBe(false);
  });
});
