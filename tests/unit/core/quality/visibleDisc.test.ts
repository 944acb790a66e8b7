import { describe, expect, it } from 'vitest';
import {
  besselPair,
  type DiscTexture,
  detectability,
  powerAt,
  visibleContrast,
  visibleDisc,
} from '../../../../core/quality/index.js';

/** White noise of SD 25 HU on pixels of 0.4 mm has σ²Δ² = 100 HU²mm² at every frequency. */
const WHITE: DiscTexture = {
  frequencyPerMm: [0.08, 0.4, 0.8, 1.25],
  powerHu2Mm2: [100, 100, 100, 100],
  blurFwhmMm: 0,
};

const known = (result: ReturnType<typeof detectability>): number => {
  if (!result.ok) throw new Error(result.refusal.text);
  return result.value;
};

describe('besselPair', () => {
  it('gives J₀ and J₁ to a ten-millionth', () => {
    // scipy.special.j0, j1; 2.404826 and 3.831706 are the first zeros (Abramowitz & Stegun 1964, table 9.5).
    const table = [
      [0, 1, 0],
      [1, 0.7651976866, 0.4400505857],
      [2.4048255577, 0, 0.5191474973],
      [3, -0.260051955, 0.3390589585],
      [3.8317059702, -0.4027593957, 0],
      [5, -0.1775967713, -0.3275791376],
      [25, 0.0962667833, -0.1253502496],
    ] as const;
    for (const [x, j0, j1] of table) {
      expect(besselPair(x).j0).toBeCloseTo(j0, 7);
      expect(besselPair(x).j1).toBeCloseTo(j1, 7);
    }
  });
});

describe('powerAt', () => {
  const texture = { frequencyPerMm: [0.1, 0.2, 0.4], powerHu2Mm2: [10, 40, 20] };

  it('is straight between the told frequencies and stays at the outer ones beyond them', () => {
    const at = [0, 0.1, 0.15, 0.2, 0.3, 2].map((frequency) => powerAt(texture, frequency));
    [10, 10, 25, 40, 30, 20].forEach((expected, index) => {
      expect(at[index]).toBeCloseTo(expected, 10);
    });
  });
});

describe('detectability by a matched filter that does not prewhiten', () => {
  it('of a disc in white noise is contrast·√(area/NPS)', () => {
    // By hand: 50·√(π·1.5²/100) = 13.29, which is CNR·√(pixels) = 2·√44.18.
    expect(known(detectability(WHITE, 3, 50))).toBeCloseTo(13.293, 3);
    // The same for a large and a very small disc: all of its power counts.
    expect(known(detectability(WHITE, 10, 20))).toBeCloseTo(2 * Math.sqrt(78.539816), 3);
    expect(known(detectability(WHITE, 0.2, 100))).toBeCloseTo(10 * Math.sqrt(0.0314159), 3);
  });

  it('rises in proportion to contrast, whichever way it goes', () => {
    const once = known(detectability(WHITE, 2, 30));
    expect(known(detectability(WHITE, 2, 90))).toBeCloseTo(3 * once, 10);
    expect(known(detectability(WHITE, 2, -30))).toBe(once);
  });

  it('of a tiny disc in white noise behind a Gaussian blur is contrast·area / √(NPS·4πσ²)', () => {
    // For a point of strength CA: ∬TTF² = ∬exp(−4π²σ²f²) = 1/(4πσ²), so that d′² = (CA)²/(4πσ²·NPS).
    const sigmaMm = 0.5;
    const texture = { ...WHITE, blurFwhmMm: sigmaMm * 2 * Math.sqrt(2 * Math.LN2) };
    const areaMm2 = (Math.PI / 4) * 0.02 ** 2;
    const expected = (5000 * areaMm2) / Math.sqrt(4 * Math.PI * sigmaMm ** 2 * 100);
    expect(known(detectability(texture, 0.02, 5000)) / expected).toBeCloseTo(1, 3);
  });

  it('agrees with the integrals done point by point over frequency, with blur and noise that is not white', () => {
    // scipy.integrate.quad over 2πf df, with scipy.special.j1, of a 2 mm disc of 60 HU; σ = 0.4 mm and
    // NPS = 200·f/0.4 up to 0.4 per mm and 200 beyond, which straight lines between rings give exactly.
    const texture = {
      frequencyPerMm: [1e-9, 0.4, 3],
      powerHu2Mm2: [0, 200, 200],
      blurFwhmMm: 0.4 * 2 * Math.sqrt(2 * Math.LN2),
    };
    expect(known(detectability(texture, 2, 60))).toBeCloseTo(7.9209, 2);
  });

  it('is refused where the blur or the noise could not be measured', () => {
    const noBlur = detectability({ ...WHITE, blurFwhmMm: null }, 3, 50);
    expect(!noBlur.ok && noBlur.refusal.code).toBe('no-blur');
    const noNoise = detectability({ ...WHITE, powerHu2Mm2: [0, 0, 0, 0] }, 3, 50);
    expect(!noNoise.ok && noNoise.refusal.code).toBe('no-noise');
  });

  it('throws for a diameter that is none', () => {
    expect(() => detectability(WHITE, 0, 50)).toThrow('invalid diameter: 0');
  });
});

describe('visibleDisc and visibleContrast, by Rose’s criterion', () => {
  it('in white noise give the diameter 2k·√(NPS/π)/contrast', () => {
    // Rose 1948: C·√(A/NPS) = k. At 50 HU and k = 5: 2·5·10/(50·√π) = 1.128 mm.
    expect(known(visibleDisc(WHITE, 50, 5)) / 1.12838).toBeCloseTo(1, 2);
    expect(known(visibleDisc(WHITE, 50, 3)) / 0.67703).toBeCloseTo(1, 2);
    expect(known(visibleContrast(WHITE, 1.12838, 5))).toBeCloseTo(50, 2);
  });

  it('are refused where no disc of up to 12 mm is seen, or the smallest asked about is', () => {
    const none = visibleDisc(WHITE, 1, 5);
    expect(!none.ok && none.refusal.text).toBe('No disc of up to 12 mm is seen.');
    const zero = visibleDisc(WHITE, 0, 5);
    expect(!zero.ok && zero.refusal.code).toBe('none-seen');
    const all = visibleDisc(WHITE, 3000, 3);
    expect(!all.ok && all.refusal.text).toBe('Even a disc of 0.2 mm is seen.');
  });
});
