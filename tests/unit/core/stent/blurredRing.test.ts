/**
 * What a Gaussian blur does to struts, against tables that were computed by 1-D integrals outside of this project (bars: closed
 * form with the error function; rings: the sum over circles). The same formulas are summed here by other means.
 */
import { describe, expect, it } from 'vitest';
import { FREQUENCIES } from '../../../../core/stent/frequencies.js';
import { modelProfiles } from '../../../../core/stent/modelProfile.js';
import { profileShape } from '../../../../core/stent/profileShape.js';

const FWHM_PER_SIGMA = 2.35482;

/** Means of a Gaussian over a bar: Φ at its ends, by Simpson's rule. */
function blurredBar(x: number, width: number, sigma: number): number {
  const steps = 200;
  let sum = 0;
  for (let step = 0; step <= steps; step += 1) {
    const t = x - width / 2 + (width * step) / steps;
    const weight = step === 0 || step === steps ? 1 : step % 2 === 0 ? 2 : 4;
    sum += weight * Math.exp((-t * t) / (2 * sigma * sigma));
  }
  return (sum * width) / (3 * steps) / (sigma * Math.sqrt(2 * Math.PI));
}

function profileOf(hu: (x: number) => number, halfMm: number, stepMm = 0.01) {
  const count = Math.round((2 * halfMm) / stepMm) + 1;
  const atMm = Array.from({ length: count }, (_, index) => index * stepMm);
  return { atMm, hu: atMm.map((at) => hu(at - halfMm)) };
}

describe('two struts far apart', () => {
  // FWHM of the blur, width of the strut, peak as a part of the strut's height, FWHM of what is seen.
  it.each([
    [0.4, 0.08, 0.18617, 0.40371],
    [0.4, 0.1, 0.23151, 0.40581],
    [0.4, 0.15, 0.34117, 0.41317],
    [0.4, 0.5, 0.85891, 0.5596],
    [0.4, 1, 0.99676, 1.00138],
    [0.5, 0.08, 0.14943, 0.50296],
    [0.5, 0.1, 0.18617, 0.50464],
    [0.5, 0.15, 0.27608, 0.51049],
    [0.5, 0.5, 0.76097, 0.62469],
    [0.5, 1, 0.98147, 1.00986],
    [0.6, 0.08, 0.12475, 0.60247],
    [0.6, 0.1, 0.15557, 0.60386],
    [0.6, 0.15, 0.23151, 0.60872],
    [0.6, 0.5, 0.67349, 0.70199],
    [0.6, 1, 0.95028, 1.03173],
    [0.8, 0.08, 0.09373, 0.80185],
    [0.8, 0.1, 0.11701, 0.80289],
    [0.8, 0.15, 0.17472, 0.80652],
    [0.8, 0.5, 0.5382, 0.87478],
    [0.8, 1, 0.85891, 1.11921],
    [1, 0.08, 0.07504, 1.00148],
    [1, 0.1, 0.09373, 1.00231],
    [1, 0.15, 0.14019, 1.00521],
    [1, 0.5, 0.44394, 1.05912],
    [1, 1, 0.76097, 1.24937],
  ])('blur %f mm, strut %f mm: peak and width at half height', (blur, width, peak, seen) => {
    const sigma = blur / FWHM_PER_SIGMA;
    const height = 6000;
    const found = profileShape(
      profileOf(
        (x) => height * (blurredBar(x - 4, width, sigma) + blurredBar(x + 4, width, sigma)),
        8,
      ),
    );
    if (!found.ok) throw new Error(found.refusal.text);
    expect((found.value.struts[0]?.peakHu ?? 0) / height).toBeCloseTo(peak, 4);
    expect(found.value.strutWidthMm).toBeCloseTo(seen, 3);
  });
});

/** e^(−x)·I₀(x): mean of e^(x(cos θ − 1)) over the circle. */
function scaledI0(x: number): number {
  const steps = 96;
  let sum = 0;
  for (let step = 0; step < steps; step += 1)
    sum += Math.exp(x * (Math.cos((2 * Math.PI * step) / steps) - 1));
  return sum / steps;
}

const [LUMEN, STRUT, OUTSIDE] = [400, 6000, -80];

/** A round image blurred by a Gaussian in the plane, at a distance from its middle: the sum over its circles. */
function blurredRing(r: number, innerRadius: number, sigma: number): number {
  const step = 0.008;
  let sum = OUTSIDE;
  const within = (from: number, to: number, hu: number): void => {
    const count = Math.ceil((to - from) / step);
    const ds = (to - from) / count;
    for (let index = 0; index < count; index += 1) {
      const s = from + (index + 0.5) * ds;
      const gauss = Math.exp((-(r - s) * (r - s)) / (2 * sigma * sigma));
      sum += ((hu * s) / (sigma * sigma)) * gauss * scaledI0((r * s) / (sigma * sigma)) * ds;
    }
  };
  within(0, innerRadius, LUMEN - OUTSIDE);
  within(innerRadius, innerRadius + 0.1, STRUT - OUTSIDE);
  return sum;
}

const RINGS: readonly (readonly [
  innerMm: number,
  blurMm: number,
  centreHu: number,
  seenMm: number,
  narrowing: number,
])[] = [
  [2.5, 0.5, 400.0, 2.014, 19.45],
  [2.5, 0.8, 404.169, 1.575, 36.99],
  [2.5, 1, 434.728, 1.28, 48.79],
  [3, 0.5, 400.0, 2.521, 15.96],
  [3, 0.8, 400.235, 2.096, 30.14],
  [3, 1, 405.91, 1.778, 40.73],
  [3.5, 0.5, 400.0, 3.026, 13.54],
  [3.5, 0.8, 400.007, 2.612, 25.39],
  [3.5, 1, 400.69, 2.298, 34.33],
];

describe('a profile through a blurred ring', () => {
  it.each(RINGS)(
    'inner diameter %f mm, blur %f mm: centre, visible width and narrowing',
    (inner, blur, centre, seen, narrowing) => {
      const sigma = blur / FWHM_PER_SIGMA;
      expect(blurredRing(0, inner / 2, sigma)).toBeCloseTo(centre, 1);
      const found = profileShape(
        profileOf((x) => blurredRing(Math.abs(x), inner / 2, sigma), 4, 0.04),
      );
      if (!found.ok) throw new Error(found.refusal.text);
      const { visibleWidthMm, lumenHu } = found.value;
      // The table's half height starts from the centre, ours from the median of the middle third: the lumen's own level.
      expect(Math.abs(visibleWidthMm - seen)).toBeLessThan(0.03 + 0.00025 * (lumenHu - centre));
      expect(Math.abs(100 * (1 - visibleWidthMm / inner) - narrowing)).toBeLessThan(3);
    },
  );
});

describe('the model of a stent', () => {
  it.each(RINGS.filter(([, blur]) => blur === 1))(
    'has the centre of a blurred ring of %f mm, blur %f mm',
    (inner, blur, centre) => {
      const [profile] = modelProfiles(
        {
          radiusMm: inner / 2 + 0.05,
          wallWidthMm: 0.05,
          blurSigmaMm: blur / FWHM_PER_SIGMA,
          lumenHu: LUMEN,
          // The lumen's disc reaches to the middle of the struts: half a strut of lumen, half of what is outside.
          massHuMm: 0.1 * STRUT - 0.05 * LUMEN - 0.05 * OUTSIDE,
          wallHu: OUTSIDE,
          fatHu: OUTSIDE,
          levelHu: 0,
        },
        {
          kernels: [
            {
              response: FREQUENCIES.map(() => 1),
              amplitude: FREQUENCIES.map(() => 1),
              endError: FREQUENCIES.map(() => 0),
            },
          ],
          scaleError: 0,
          bands: [],
        },
      );
      expect(Math.abs((profile?.hu[0] ?? Number.NaN) - centre)).toBeLessThan(1.5);
    },
  );
});
