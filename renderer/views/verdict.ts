import type { Evidence } from '../../core/note/index.js';
import type { VerdictProps } from '../panels/Verdict.js';
import type { PairState } from '../state/appState.js';

/** Checks whose silence leaves a doubt about the pair. */
const MUST_AGREE = new Set(['patient', 'study', 'frame of reference', 'overlap']);
/** Labels of kernels differ in every true pair. */
const MAY_DIFFER = new Set(['kernel label']);

/** What the headers say of two stacks, in one word. */
export function headerVerdict(
  evidence: readonly Evidence[],
  refusal: string | undefined,
): 'pair' | 'reservations' | 'refused' {
  if (refusal !== undefined) return 'refused';
  const isDoubtful = evidence.some(
    ({ check, state }) =>
      (state === 'differs' && !MAY_DIFFER.has(check)) ||
      (state === 'unknown' && MUST_AGREE.has(check)),
  );
  return isDoubtful ? 'reservations' : 'pair';
}

/** The verdict on the pair that is shown. */
export function verdictOf(pair: PairState | undefined): VerdictProps {
  if (pair === undefined) return { verdict: 'none', lines: [], evidence: [] };
  if (pair.sharp === undefined) return { verdict: 'single', lines: [], evidence: [] };
  const { evidence } = pair;
  const doubts = evidence.filter(
    ({ check, state }) => state === 'differs' && !MAY_DIFFER.has(check),
  );
  return {
    verdict: headerVerdict(evidence, undefined),
    lines: [
      ...(pair.link === 'index'
        ? ['Linked by slice number: positions can’t be compared.']
        : ['Linked by position in the patient.']),
      ...(doubts.length === 0 ? [] : [`Differs: ${doubts.map(({ check }) => check).join(', ')}.`]),
      ...(pair.chosenBy === 'order' ? ['Soft and sharp by series order: please check.'] : []),
    ],
    evidence,
  };
}
