import { isUnscaled, type Stack } from '../stack/index.js';
import { assessByHeaders, type DetailedAssessment } from './assessPair.js';
import { commonRange } from './commonRange.js';

/** Two stacks as their headers show them. */
export interface Candidate {
  readonly first: Stack;
  readonly second: Stack;
  /** By the headers alone. */
  readonly header: DetailedAssessment;
  readonly commonMm: number;
  /** Common slices, counted on the coarser stack. */
  readonly commonSlices: number;
  /** Place in the order of the series. */
  readonly order: number;
}

/** With fewer slices in common two stacks are a localizer or a piece, no volume. Common practice, no source. */
const LEAST_SLICES = 8;
/** A pair that shares less than this part of what the longest shares stands behind it. */
const SHORT = 0.5;

/** Every two stacks of one patient and study, in series order; those that the headers refuse for good included, those without scale not. */
export function candidatesOf(stacks: readonly Stack[]): readonly Candidate[] {
  return pairsOf(stacks.filter((stack) => !isUnscaled(stack))).filter(
    ({ header }) =>
      !header.refusedFor.some(({ check }) => check === 'patient' || check === 'study'),
  );
}

/** Every two stacks whatever they are of. */
export function pairsOf(stacks: readonly Stack[]): readonly Candidate[] {
  const candidates: Candidate[] = [];
  stacks.forEach((first, index) => {
    for (const second of stacks.slice(index + 1)) {
      const header = assessByHeaders(first, second, 'only the most promising pairs were looked at');
      const common = commonRange(first, second);
      const commonMm = common === undefined ? 0 : common.toMm - common.fromMm;
      const spacingMm = Math.max(first.sliceSpacingMm ?? 0, second.sliceSpacingMm ?? 0);
      const commonSlices =
        common === undefined ? 0 : spacingMm > 0 ? Math.floor(commonMm / spacingMm + 1e-3) + 1 : 1;
      candidates.push({ first, second, header, commonMm, commonSlices, order: candidates.length });
    }
  });
  return candidates;
}

/** Whether a candidate shares so little that longer ones go first: a localizer, a test slice, a piece of a volume. */
export function isShort(candidate: Candidate, all: readonly Candidate[]): boolean {
  const longest = Math.max(...all.map(({ commonMm }) => commonMm));
  return candidate.commonSlices < LEAST_SLICES || candidate.commonMm < SHORT * longest;
}
