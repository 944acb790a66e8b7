import type { DetailedAssessment } from './assessPair.js';
import { type Candidate, isShort } from './candidates.js';
import { isSameKernel } from './sharpnessEvidence.js';

/** A candidate with the assessment that is known of it. */
export interface RankedPair {
  readonly candidate: Candidate;
  readonly assessment: DetailedAssessment;
}

/**
 * Best first: what is refused comes last, before it what is short; then those that measure as soft and sharp, those that
 * are not told apart, copies of one kernel; fewer reservations; the longer common range, the closer slices; and the order
 * of the series where all that is equal.
 */
export function rankPairs(pairs: readonly RankedPair[]): readonly RankedPair[] {
  const all = pairs.map(({ candidate }) => candidate);
  const keyed = pairs.map((pair) => ({ pair, key: rankKey(pair, all) }));
  keyed.sort((a, b) => compareKeys(a.key, b.key));
  return keyed.map(({ pair }) => pair);
}

function rankKey(
  { candidate, assessment }: RankedPair,
  all: readonly Candidate[],
): readonly number[] {
  const { verdict, sharpness, reservations, measured } = assessment;
  const kernels = sharpness.decided ? 0 : isSameKernel(sharpness) ? 2 : 1;
  const doubts = reservations.map(({ state }) => (state === 'differs' ? 2 : 1));
  return [
    verdict === 'refused' ? 1 : 0,
    isShort(candidate, all) ? 1 : 0,
    kernels,
    measured ? 0 : 1,
    doubts.reduce((sum: number, doubt) => sum + doubt, 0),
    -Math.round(candidate.commonMm),
    spacingOf(candidate),
    candidate.order,
  ];
}

function spacingOf({ first, second }: Candidate): number {
  return Math.max(first.sliceSpacingMm ?? Infinity, second.sliceSpacingMm ?? Infinity);
}

/** Number by number; the first that differs decides. */
export function compareKeys(a: readonly number[], b: readonly number[]): number {
  for (const [index, value] of a.entries()) {
    const other = b[index] ?? 0;
    if (value !== other) return value < other ? -1 : 1;
  }
  return 0;
}
