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

  it('refuses noise that has its power at low frequencies, as that of other reconstructions', () => {
    const found = apodisationOf([
      textureOf((f) => 40 * Math.exp(-f / 0.12)),
      textureOf((f) => 40 * Math.exp(-f / 0.3)),
    ]);
    expect(found).toMatchObject({ ok: false, refusal: { code: 'not-linear' } });
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
