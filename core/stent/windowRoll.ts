import { FREQUENCIES } from './frequencies.js';

/**
 * A form that windows of reconstruction filters have: exp(a·f² + b·f⁴ + d·f⁶) below an end, nothing beyond. It holds
 * cosine, Hann, Hamming, Gaussian and sinc windows within 0.02, each multiplied with what interpolation does.
 */
export interface WindowRoll {
  readonly a: number;
  readonly b: number;
  readonly d: number;
  readonly endPerMm: number;
}

/** The end is not told finer than this, per mm: the response goes down to 0 over it. */
const END_WIDTH_PER_MM = 0.04;

/** W at {@link FREQUENCIES}. */
export function rolledResponse({ a, b, d, endPerMm }: WindowRoll): Float64Array {
  return FREQUENCIES.map((f) => {
    const square = f * f;
    const left = Math.min(1, Math.max(0, (endPerMm - f) / END_WIDTH_PER_MM + 0.5));
    return left * Math.exp(Math.min(1, square * (a + square * (b + square * d))));
  });
}
