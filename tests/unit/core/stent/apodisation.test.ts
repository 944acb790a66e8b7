import { describe, expect, it } from 'vitest';
import type { KernelTexture } from '../../../../core/quality/index.js';
import { FREQUENCIES } from '../../../../core/stent/frequencies.js';
import { apodisationOf } from '../../../../core/stent/index.js';
import { shownRoots } from '../../../../core/stent/shownRoots.js';

/** A texture whose rings show the noise of these amplitudes √NPS(f). */
function textureOf(amplitude: (f: number) => number): KernelTexture {
  const frequencyPerMm = [0.02, ...Array.from({ length: 16 }, (_, ring) => 0.08 * (ring + 1))];
  const roots = shownRoots(FREQUENCIES.map(amplitude), frequencyPerMm);
  return {
    noiseSdHu: 20,
    areas: 100,
    frequencyPerMm,
    powerHu2Mm2: Array.from(roots, (root, k) => root * root * (frequencyPerMm[k] ?? 0)),
    meanPerMm: 0.4,
    peakPerMm: 0.4,
    riseMm: null,
    blurFwhmMm: null,
  };
}

/** Windows as Harris 1978 (doi 10.1109/PROC.1978.10837) and Kak & Slaney 1988, chapter 3, give them. */
const WINDOWS: Readonly<Record<string, (x: number) => number>> = {
  hann: (x) => (x < 1 ? 0.5 + 0.5 * Math.cos(Math.PI * x) : 0),
  cosine: (x) => (x < 1 ? Math.cos((Math.PI * x) / 2) : 0),
  hamming: (x) => (x < 1 ? 0.54 + 0.46 * Math.cos(Math.PI * x) : 0),
  'shepp-logan': (x) =>
    x < 1 ? (x === 0 ? 1 : Math.sin((Math.PI * x) / 2) / ((Math.PI * x) / 2)) : 0,
};

describe('apodisationOf', () => {
  it.each([
    ['hann', 0.62, 'cosine', 1.26],
    ['hann', 0.75, 'hamming', 1.2],
    ['cosine', 0.65, 'shepp-logan', 1.1],
  ] as const)(
    'tells %s %f and %s %f from their noise alone, to 0.045',
    (a, softEnd, b, sharpEnd) => {
      const soft = (f: number): number => WINDOWS[a]?.(f / softEnd) ?? 0;
      const sharp = (f: number): number => WINDOWS[b]?.(f / sharpEnd) ?? 0;
      const found = apodisationOf([
        textureOf((f) => 70 * Math.sqrt(f) * soft(f)),
        textureOf((f) => 70 * Math.sqrt(f) * sharp(f)),
      ]);
      if (!found.ok) throw new Error(found.refusal.text);
      [soft, sharp].forEach((window, kernel) => {
        const end = kernel === 0 ? softEnd : sharpEnd;
        FREQUENCIES.forEach((f, index) => {
          // At its very end a window that breaks off is not told finer than the rings are.
          if (Math.abs(f - end) < 0.1) return;
          expect(
            Math.abs((found.value.kernels[kernel]?.response[index] ?? 9) - window(f)),
          ).toBeLessThan(0.045);
        });
      });
      expect(found.value.scaleError).toBeLessThan(0.05);
    },
  );

  it('sees that a window breaks off where noisy rings would let it roll off as well', () => {
    // Rings of a synthetic pair, back projected with windows that end at 0.65 and, broken off, at 1.1 per mm.
    const rings = (powerHu2Mm2: readonly number[], riseMm: number): KernelTexture => ({
      ...textureOf(() => 1),
      areas: 120,
      riseMm,
      powerHu2Mm2,
    });
    const soft = [
      1037, 1058, 1085, 1256, 1214, 831.7, 519.6, 103, 1.774, 0.02987, 11.08, 8.269, 5.996, 5.156,
      4.389, 3.771, 2.966,
    ];
    const sharp = [
      1344, 1344, 1227, 1616, 2243, 2257, 2830, 2632, 2886, 2728, 2245, 2050, 1784, 1360, 537,
      161.2, 108.4,
    ];
    const textures = [rings(soft, 1.216), rings(sharp, 0.62)];
    for (const some of [textures, textures.slice(1)]) {
      const found = apodisationOf(some);
      if (!found.ok) throw new Error(found.refusal.text);
      const response = found.value.kernels.at(-1)?.response;
      const at = (f: number): number => response?.[Math.round(f / 0.02 - 0.5)] ?? Number.NaN;
      // Interpolation between detectors 0.35 mm apart multiplies the window with sinc²(0.35·f).
      const seen = (f: number): number => {
        const x = 0.35 * Math.PI * f;
        return (WINDOWS['shepp-logan']?.(f / 1.1) ?? Number.NaN) * (Math.sin(x) / x) ** 2;
      };
      expect(Math.abs(at(1.03) - seen(1.03))).toBeLessThan(0.03);
      expect(Math.abs(at(1.07) - seen(1.07))).toBeLessThan(0.03);
      expect(at(1.15)).toBeLessThan(0.1);
      expect(at(1.17)).toBeLessThan(0.02);
    }
  });

  it('refuses noise that has its power at low frequencies, as that of other reconstructions', () => {
    const found = apodisationOf([
      textureOf((f) => 40 * Math.exp(-f / 0.12)),
      textureOf((f) => 40 * Math.exp(-f / 0.3)),
    ]);
    expect(found).toMatchObject({ ok: false, refusal: { code: 'not-linear' } });
  });

  it('refuses noise whose edges are sharper than it lets expect: smoothing that keeps edges takes noise alone', () => {
    const window = (f: number, end: number): number => WINDOWS.hann?.(f / end) ?? 0;
    const pair = (riseMm: number | null) => [
      { ...textureOf((f) => 70 * Math.sqrt(f) * window(f, 0.6)), riseMm },
      textureOf((f) => 70 * Math.sqrt(f) * window(f, 1.2)),
    ];
    // Behind a Hann window that ends at 0.6 per mm and a Gaussian of 0.1 mm an edge rises from 10 to 90 % over 1.634 mm (scipy:
    // brentq on ½ + ∫ W·sin(2πfx)/(πf) df).
    expect(apodisationOf(pair(1.634)).ok).toBe(true);
    expect(apodisationOf(pair(1.75)).ok).toBe(true);
    expect(apodisationOf(pair(null)).ok).toBe(true);
    expect(apodisationOf(pair(1.3))).toMatchObject({
      ok: false,
      refusal: { code: 'not-linear', text: expect.stringContaining('edges are sharper') },
    });
  });

  it('refuses white noise', () => {
    const found = apodisationOf([textureOf(() => 20), textureOf(() => 40)]);
    expect(found).toMatchObject({ ok: false, refusal: { code: 'not-linear' } });
  });

  it('refuses two kernels whose noise is not of one acquisition', () => {
    const window = (f: number, end: number): number => WINDOWS.hann?.(f / end) ?? 0;
    const found = apodisationOf([
      textureOf((f) => 140 * Math.sqrt(f) * window(f, 0.7)),
      textureOf((f) => 70 * Math.sqrt(f) * window(f, 1.2)),
    ]);
    expect(found).toMatchObject({ ok: false, refusal: { code: 'not-linear' } });
  });

  it('refuses a spectrum of few rings', () => {
    const texture = textureOf((f) => 70 * Math.sqrt(f));
    const few = {
      ...texture,
      frequencyPerMm: texture.frequencyPerMm.slice(0, 5),
      powerHu2Mm2: texture.powerHu2Mm2.slice(0, 5),
    };
    expect(apodisationOf([few, texture])).toMatchObject({ ok: false });
  });
});
