import { statistics } from '../region/index.js';
import { studentTQuantile } from './studentT.js';

/** An estimate with its 95 % confidence interval. */
export interface Estimate {
  readonly value: number;
  readonly low: number;
  readonly high: number;
}

/** Agreement of two series of measurements of the same things. */
export interface BlandAltman {
  readonly n: number;
  /** Mean of the differences first − second, with its confidence interval. */
  readonly bias: Estimate;
  /** Sample SD of the differences. */
  readonly sd: number;
  /** Limits of agreement bias ± 1.96 SD, with their confidence intervals. */
  readonly lower: Estimate;
  readonly upper: Estimate;
  /** Mean and difference of each pair, in the given order: the points of the plot. */
  readonly points: readonly { readonly mean: number; readonly difference: number }[];
}

/** The factor of the published definitions; the normal quantile rounded as there. */
const NORMAL_975 = 1.96;

/**
 * Bland and Altman (Lancet 1986; i: 307–310): bias, limits of agreement, and confidence intervals with the standard
 * errors √(s²/n) and √(3s²/n).
 *
 * @returns undefined for fewer than two pairs
 */
export function blandAltman(
  first: readonly number[],
  second: readonly number[],
): BlandAltman | undefined {
  if (first.length !== second.length) {
    throw new RangeError(`series of unlike length: ${first.length} and ${second.length}`);
  }
  const points = first.map((value, index) => {
    const other = second[index] ?? Number.NaN;
    return { mean: (value + other) / 2, difference: value - other };
  });
  const { n, mean, sd } = statistics(points.map(({ difference }) => difference));
  if (mean === undefined || sd === undefined) return undefined;
  const t = studentTQuantile(0.975, n - 1);
  const around = (value: number, standardError: number): Estimate => ({
    value,
    low: value - t * standardError,
    high: value + t * standardError,
  });
  const limitError = Math.sqrt((3 * sd * sd) / n);
  return {
    n,
    bias: around(mean, sd / Math.sqrt(n)),
    sd,
    lower: around(mean - NORMAL_975 * sd, limitError),
    upper: around(mean + NORMAL_975 * sd, limitError),
    points,
  };
}

/** How far two readings of the same thing by the same method lie apart. */
export interface Repeatability {
  readonly n: number;
  /** Within-subject SD √(Σd² / 2n). */
  readonly withinSd: number;
  /** Coefficient of repeatability 1.96 √2 · within-subject SD: 95 % of repeated readings differ by less. */
  readonly coefficient: number;
}

/** Repeatability of pairs of readings (Bland and Altman 1986; differences about zero). Undefined without pairs. */
export function repeatability(
  first: readonly number[],
  second: readonly number[],
): Repeatability | undefined {
  if (first.length !== second.length) {
    throw new RangeError(`series of unlike length: ${first.length} and ${second.length}`);
  }
  const n = first.length;
  if (n === 0) return undefined;
  const squares = first.reduce(
    (sum, value, index) => sum + (value - (second[index] ?? value)) ** 2,
    0,
  );
  const withinSd = Math.sqrt(squares / (2 * n));
  return { n, withinSd, coefficient: NORMAL_975 * Math.SQRT2 * withinSd };
}
