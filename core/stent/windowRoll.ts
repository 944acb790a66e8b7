import { FREQUENCIES } from './frequencies.js';

/**
 * A form that windows of reconstruction filters have: (1 − (f/end)²)ᵖ·exp(a·f² + b·f⁴) below an end, nothing beyond. With
 * p = 1 and 2 it holds cosine and Hann windows, with p = 0 those that break off or roll off as a Gaussian, each multiplied
 * with what interpolation does, within 0.02.
 */
export interface WindowRoll {
  readonly a: number;
  readonly b: number;
  readonly power: number;
  readonly endPerMm: number;
}

/** The end is not told finer than this, per mm: the response goes down to 0 over it. */
const END_WIDTH_PER_MM = 0.04;

/** W at {@link FREQUENCIES}. */
export function rolledResponse({ a, b, power, endPerMm }: WindowRoll): Float64Array {
  const last = endPerMm + END_WIDTH_PER_MM / 2;
  return FREQUENCIES.map((f) => {
    if (f >= last) return 0;
    const square = f * f;
    const left = Math.min(1, (last - f) / END_WIDTH_PER_MM);
    return (
      left *
      (1 - square / (last * last)) ** power *
      Math.exp(Math.min(1, square * (a + square * b)))
    );
  });
}
