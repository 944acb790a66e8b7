import { alongNormal } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import { sliceIndexAt } from '../link/slicePosition.js';
import type { NoiseArea } from '../pairing/measuredPair.js';
import type { AppState } from './appState.js';
import { takesMarks } from './regionSelectors.js';
import { shownSlice, stackOf } from './selectors.js';

/** The areas in which noise was measured that lie on the slice that a plate shows. */
export function noiseAreasOn(state: AppState, kernel: Kernel): readonly NoiseArea[] {
  const { assessment } = state;
  const stack = stackOf(state, kernel);
  const shown = shownSlice(state, kernel);
  if (assessment.kind !== 'done' || stack === undefined || shown === undefined) return [];
  if (!takesMarks(state, kernel)) return [];
  const { grid } = stack.slices[0].image;
  return assessment.measured.areas.filter(
    ({ centreMm }) => sliceIndexAt(stack, alongNormal(grid, centreMm)) === shown.index,
  );
}

/** Where noise was measured, for the reader: how many areas, and on which slices of the soft stack, by their numbers. */
export function noiseAreasText({ assessment, pair }: AppState): string | undefined {
  if (assessment.kind !== 'done' || pair === undefined) return undefined;
  const { areas } = assessment.measured;
  const { grid } = pair.soft.slices[0].image;
  const slices = new Set(
    areas.flatMap(({ centreMm }) => sliceIndexAt(pair.soft, alongNormal(grid, centreMm)) ?? []),
  );
  const numbers = [...slices].sort((a, b) => a - b).map((index) => String(index + 1));
  const list = numbers.join(', ');
  return `Noise was measured in ${areas.length} areas on ${numbers.length === 1 ? 'slice' : 'slices'} ${list} of the soft stack.`;
}
