import { type BlandAltman, blandAltman, type Repeatability, repeatability } from './blandAltman.js';
import { type IntraclassCorrelation, intraclass } from './intraclass.js';

/** All that is said of two readings of the same things. */
export interface Agreement {
  readonly n: number;
  readonly limits: BlandAltman;
  readonly repeatability: Repeatability;
  /** Undefined where all values are the same. */
  readonly intraclass: IntraclassCorrelation | undefined;
  /** Said where so few pairs tell little. */
  readonly caution: string | undefined;
}

/** With fewer pairs there is no SD of the differences worth its name. */
const LEAST_PAIRS = 3;
/** Limits of agreement from fewer pairs are wide: their own interval is about ±0.62 SD at 30 (Bland & Altman 1986). */
const ENOUGH_PAIRS = 30;

/** Agreement of two series; a sentence in its place where there are too few pairs. */
export function agreement(
  first: readonly number[],
  second: readonly number[],
): Agreement | { readonly reason: string } {
  const n = first.length;
  if (n < LEAST_PAIRS) {
    return {
      reason: `${n} regions were read twice here: agreement needs at least ${LEAST_PAIRS}.`,
    };
  }
  const limits = blandAltman(first, second);
  const again = repeatability(first, second);
  if (limits === undefined || again === undefined)
    return { reason: 'No agreement can be computed.' };
  return {
    n,
    limits,
    repeatability: again,
    intraclass: intraclass(first.map((value, index) => [value, second[index] ?? value])),
    caution:
      n < ENOUGH_PAIRS
        ? `${n} pairs only: the limits themselves are uncertain, see their intervals.`
        : undefined,
  };
}
