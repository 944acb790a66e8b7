import { type Result, refuse, success } from '../result.js';
import { isUnscaled, type Stack, withMaskedPadding } from '../stack/index.js';
import type { StackReference } from './plan.js';

/** Phases are stated in whole or tenths of a percent; closer than this is the same one. */
const SAME_PHASE_PERCENT = 0.01;

/**
 * The one stack that a reference names, masked as it says. None, or more than one, is refused: a stack is never guessed.
 */
export function selectStack(
  { seriesInstanceUid, phasePercent, maskedBelowHu }: StackReference,
  stacks: readonly Stack[],
): Result<Stack> {
  const ofSeries = stacks.filter(
    (stack) => stack.slices[0].image.acquisition.seriesInstanceUid === seriesInstanceUid,
  );
  if (ofSeries.length === 0) {
    return refuse('no-series', `The folder has no series ${seriesInstanceUid}.`);
  }
  const fitting =
    phasePercent === undefined
      ? ofSeries
      : ofSeries.filter((stack) => {
          const stated = phaseOf(stack);
          return stated !== undefined && Math.abs(stated - phasePercent) < SAME_PHASE_PERCENT;
        });
  const [only, ...others] = fitting;
  if (only === undefined) {
    return refuse(
      'no-phase',
      `Series ${seriesInstanceUid} has no stack at phase ${phasePercent} %. It has: ${phases(ofSeries)}.`,
    );
  }
  if (others.length === 0) {
    if (isUnscaled(only)) {
      return refuse(
        'no-pixel-spacing',
        `Series ${seriesInstanceUid} has no pixel spacing: nothing can be measured on it.`,
      );
    }
    return maskedBelowHu === undefined ? success(only) : withMaskedPadding(only, maskedBelowHu);
  }
  const advice =
    phasePercent === undefined && new Set(fitting.map(phaseOf)).size === fitting.length
      ? ' Say which with phasePercent.'
      : ' They can’t be told apart by phase.';
  return refuse(
    'ambiguous-series',
    `Series ${seriesInstanceUid} holds ${fitting.length} stacks: ${phases(fitting)}.${advice}`,
  );
}

function phaseOf(stack: Stack): number | undefined {
  return stack.slices[0].image.acquisition.phasePercent;
}

function phases(stacks: readonly Stack[]): string {
  return stacks
    .map((stack) => {
      const phase = phaseOf(stack);
      const slices = `${stack.slices.length} slices`;
      return phase === undefined ? `${slices} without a stated phase` : `${slices} at ${phase} %`;
    })
    .join('; ');
}
