import type { PairTexture } from '../../core/quality/index.js';
import type { AppState } from '../state/appState.js';

/** Why nothing can be said of visibility, and what to do; undefined where it can on one kernel at least. */
export function visibleReason(
  pair: AppState['pair'],
  assessment: AppState['assessment'],
  texture: PairTexture | undefined,
): string | undefined {
  if (pair === undefined) return 'Open a study to see what could be seen in it.';
  if (pair.sharp === undefined)
    return 'Choose a pair: noise and blur are measured in the same places of two kernels.';
  const { soft, sharp } = texture ?? { soft: null, sharp: null };
  if (soft === null && sharp === null) {
    switch (assessment.kind) {
      case 'failed':
        return assessment.text;
      case 'done':
        return 'Too few uniform areas were found in both stacks to measure their noise, so nothing can be said of what could be seen.';
      default:
        return 'The noise of both kernels is being measured…';
    }
  }
  const hasBlur = [soft, sharp].some((one) => one !== null && one.blurFwhmMm !== null);
  return hasBlur
    ? undefined
    : 'Too few clean edges were found in both stacks to measure their blur, so nothing can be said of what could be seen.';
}
