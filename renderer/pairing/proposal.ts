import type { DetailedAssessment, PairVerdict } from '../../core/pairing/index.js';
import { doubtWords, sharpnessWords, shiftWords } from './pairWords.js';

/** Two stacks of the folder that could be read as a pair, as plain data. */
export interface Proposal {
  readonly softKey: string;
  readonly sharpKey: string;
  readonly verdict: PairVerdict;
  /** What decided, in one line. */
  readonly reason: string;
}

export function proposalOf(assessment: DetailedAssessment): Proposal {
  const { soft, sharp, verdict, refusedFor, reservations, sharpness, shift } = assessment;
  const measured = [...sharpnessWords(sharpness), shiftWords(shift) ?? ''];
  const words = [doubtWords([...refusedFor, ...reservations]), ...measured];
  return {
    softKey: soft.key,
    sharpKey: sharp.key,
    verdict,
    reason: words.filter((part) => part !== '').join(' · '),
  };
}
