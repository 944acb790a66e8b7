import { headerEvidence } from '../../core/pairing/index.js';
import { type Result, refuse, success } from '../../core/result.js';
import type { PairState } from '../state/appState.js';
import type { Candidate } from './choosePair.js';

/**
 * The pair that two stacks make by what their files state; refused where they are none, or where a reason of the
 * reader's is missing. With a reason for the frame of reference the plates are linked by slice number: the reader
 * answers for reading them together, but nothing shows that their positions mean the same place.
 */
export function pairOf(
  { soft, sharp, overrides = [] }: Candidate,
  chosenBy: PairState['chosenBy'],
): Result<PairState> {
  if (sharp === undefined) {
    return success({ soft, sharp, link: 'position', evidence: [], overrides: [], chosenBy });
  }
  const { refusal, needsReason, evidence, link } = headerEvidence(soft, sharp, overrides);
  if (refusal !== undefined) return refuse('no-pair', `${refusal}. Choose another pair.`);
  if (needsReason.length > 0) {
    const checks = needsReason.map(({ check }) => check).join(' and ');
    return refuse(
      'needs-reason',
      `The two stacks differ in their ${checks}. Choose another pair, or give a reason to read them together.`,
    );
  }
  const isFrameOverridden = overrides.some(({ check }) => check === 'frame of reference');
  return success({
    soft,
    sharp,
    link: isFrameOverridden ? 'index' : link,
    evidence,
    overrides,
    chosenBy,
  });
}
