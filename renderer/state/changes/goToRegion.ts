import type { AppState } from '../appState.js';
import { selectedRegion, sliceOf, takesMarks } from '../regionSelectors.js';
import { otherKernel, stackOf } from '../selectors.js';
import { goToLine } from './edges.js';
import { scrollTo } from './view.js';

/** Takes the plates to the selected region's slice: the active plate where the region lies on it, else the other. */
export function goToRegion(state: AppState): AppState {
  const region = selectedRegion(state);
  if (region === undefined) return goToLine(state);
  for (const kernel of [state.active, otherKernel(state.active)]) {
    const stack = stackOf(state, kernel);
    if (stack === undefined || !takesMarks(state, kernel)) continue;
    const index = sliceOf(region.shape, stack);
    const alongMm = index === undefined ? undefined : stack.slices[index]?.alongMm;
    if (alongMm !== undefined) return scrollTo(kernel, alongMm)(state);
  }
  return {
    ...state,
    message: { tone: 'warning', text: `${region.label} lies on no slice of these stacks.` },
  };
}
