import type { Evidence, PairOverride } from '../note/index.js';
import { weightOf } from './checks.js';
import type { PairVerdict } from './contract.js';

/** The verdict on two stacks, with the evidence that it rests on. */
export interface JudgedPair {
  readonly verdict: PairVerdict;
  /** What makes it no pair. */
  readonly refusedFor: readonly Evidence[];
  /** What differs, or is unknown, and matters; what the reader answers for is among it. */
  readonly reservations: readonly Evidence[];
}

/** Whether the reader answers for a check that differs. Patient and phase can't be answered for. */
export function isOverridden({ check }: Evidence, overrides: readonly PairOverride[]): boolean {
  return overrides.some((one) => one.check === check && one.reason.trim() !== '');
}

/**
 * Refused when the patient, the phase or the place differs, or the study or frame of reference and the reader gives no
 * reason; reservations when anything else that matters differs or is unknown; else a pair.
 */
export function pairVerdict(
  evidence: readonly Evidence[],
  overrides: readonly PairOverride[] = [],
): JudgedPair {
  const refusedFor: Evidence[] = [];
  const reservations: Evidence[] = [];
  for (const one of evidence) {
    const weight = weightOf(one);
    if (weight === 'refuses' || (weight === 'needs reason' && !isOverridden(one, overrides))) {
      refusedFor.push(one);
    } else if (weight === 'needs reason' || weight === 'doubt') {
      reservations.push(one);
    }
  }
  const verdict: PairVerdict =
    refusedFor.length > 0 ? 'refused' : reservations.length > 0 ? 'reservations' : 'pair';
  return { verdict, refusedFor, reservations };
}
