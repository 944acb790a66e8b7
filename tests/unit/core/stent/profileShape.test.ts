import { describe, expect, it } from 'vitest';
import { cubicWeights } from '../../../../core/stent/cubic.js';
import { profileShape } from '../../../../core/stent/profileShape.js';

/** HU of a profile over 8 mm in steps of 0.02 mm. */
function sampled(hu: (atMm: number) => number) {
  const atMm = Array.from({ length: 401 }, (_, index) => index * 0.02);
  return { atMm, hu: atMm.map(hu) };
}

const gauss = (x: number, sigma: number): number => Math.exp((-x * x) / (2 * sigma * sigma));
/** Full width at half maximum of a Gaussian: 2√(2 ln 2)·σ. */
const FWHM = 2.3548200450309493;
/** Error function by its series, to 1e-12 where it is used. */
function erf(x: number): number {
  let [sum, term] = [x, x];
  for (let n = 1; n < 200; n += 1) {
    term *= (-x * x) / n;
    sum += term / (2 * n + 1);
  }
  return (2 / Math.sqrt(Math.PI)) * sum;
}
const edge = (x: number, sigma: number): number =>
  Math.abs(x) > 5 * sigma ? Number(x > 0) : 0.5 * (1 + erf(x / (sigma * Math.SQRT2)));

describe('a profile across a stent', () => {
  it('finds two Gaussian struts, their distance and their full widths at half height', () => {
    const found = profileShape(
      sampled((x) => 900 * gauss(x - 2.5, 0.3) + 700 * gauss(x - 5.5, 0.3)),
    );
    if (!found.ok) throw new Error(found.refusal.text);
    expect(found.value.kind).toBe('stent');
    expect(found.value.struts.map(({ atMm }) => atMm)).toEqual([
      expect.closeTo(2.5, 4),
      expect.closeTo(5.5, 4),
    ]);
    expect(found.value.struts.map(({ peakHu }) => peakHu)).toEqual([
      expect.closeTo(900, 1),
      expect.closeTo(700, 1),
    ]);
    expect(found.value.peakDistanceMm).toBeCloseTo(3, 4);
    // The level between the struts is 0.08 HU, that outside 0: the widths are those of the Gaussians.
    expect(found.value.strutWidthMm).toBeCloseTo(FWHM * 0.3, 2);
    expect(found.value.visibleWidthMm).toBeCloseTo(3 - FWHM * 0.3, 2);
  });

  it('puts half height midway between strut and lumen, not between strut and zero', () => {
    // A lumen of 300 HU between struts that rise 600 above it: half height is 600.
    const found = profileShape(
      sampled(
        (x) =>
          300 +
          600 * (gauss(x - 2, 0.25) + gauss(x - 6, 0.25)) -
          400 * (1 - edge(x - 0.8, 0.1) + edge(x - 7.2, 0.1)),
      ),
    );
    if (!found.ok) throw new Error(found.refusal.text);
    expect(found.value.lumenHu).toBeCloseTo(300, 2);
    expect(found.value.visibleWidthMm).toBeCloseTo(4 - FWHM * 0.25, 3);
  });

  it('takes the 10–90 % distance of the inner edge', () => {
    // From 90 to 10 % of a Gaussian's own flank: σ·(√(2 ln 10) − √(2 ln(10/9))).
    const found = profileShape(sampled((x) => 800 * (gauss(x - 2, 0.3) + gauss(x - 6, 0.3))));
    if (!found.ok) throw new Error(found.refusal.text);
    expect(found.value.riseMm).toBeCloseTo(0.3 * (2.145966026289347 - 0.4590436050264207), 3);
  });
});

describe('a profile across a lumen without struts', () => {
  it('has the width of the lumen at half height, and the rise of its blur', () => {
    const found = profileShape(
      sampled((x) => -80 + 430 * (edge(x - 2.4, 0.25) - edge(x - 5.6, 0.25))),
    );
    if (!found.ok) throw new Error(found.refusal.text);
    expect(found.value).toMatchObject({ kind: 'lumen', struts: [], peakDistanceMm: null });
    expect(found.value.visibleWidthMm).toBeCloseTo(3.2, 3);
    // 10–90 % of an edge blurred by a Gaussian: 2.5631·σ.
    expect(found.value.riseMm).toBeCloseTo(2.5631 * 0.25, 2);
  });

  it('is refused where it starts inside the lumen', () => {
    const found = profileShape(sampled((x) => 350 - 430 * edge(x - 5, 0.25)));
    expect(found).toMatchObject({ ok: false, refusal: { code: 'no-half-height' } });
  });

  it('is refused where it is flat', () => {
    expect(profileShape(sampled((x) => 40 + 10 * Math.sin(x)))).toMatchObject({
      ok: false,
      refusal: { code: 'flat-profile' },
    });
  });
});

describe('cubic interpolation', () => {
  it('is exact for polynomials of second order (Keys 1981) and sums to 1', () => {
    for (const part of [0, 0.2, 0.5, 0.9]) {
      const weights = cubicWeights(part);
      const at = (power: number): number =>
        weights.reduce((sum, weight, index) => sum + weight * (index - 1) ** power, 0);
      expect(at(0)).toBeCloseTo(1, 12);
      expect(at(1)).toBeCloseTo(part, 12);
      expect(at(2)).toBeCloseTo(part ** 2, 12);
    }
  });
});

describe('a peak that is no strut', () => {
  it('of two ripples of one height on a plain lumen none is a strut', () => {
    // A plateau with overshoots of 6 HU at both edges, as interpolation leaves them.
    const found = profileShape(
      sampled(
        (x) =>
          400 * (edge(x - 2, 0.3) - edge(x - 6, 0.3)) +
          6 * (gauss(x - 2.8, 0.1) + gauss(x - 5.2, 0.1)),
      ),
    );
    if (!found.ok) throw new Error(found.refusal.text);
    expect(found.value.kind).toBe('lumen');
    expect(found.value.visibleWidthMm).toBeCloseTo(4, 1);
  });

  it('must stand out from the noise: peaks of 100 HU are struts at an SD of 15 HU, and none at 25', () => {
    const profile = sampled(
      (x) =>
        400 * (edge(x - 2, 0.2) - edge(x - 6, 0.2)) +
        100 * (gauss(x - 2.8, 0.2) + gauss(x - 5.2, 0.2)),
    );
    const kinds = [15, 25].map((noiseHu) => {
      const found = profileShape(profile, noiseHu);
      return found.ok ? found.value.kind : found.refusal.code;
    });
    expect(kinds).toEqual(['stent', 'lumen']);
  });
});
