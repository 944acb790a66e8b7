import type { AppState } from '../state/appState.js';
import { KERNELS, shownSlice, stackOf } from '../state/selectors.js';
import type { PairVolumes } from '../volumes/loadPair.js';

/** Whether every plate shows its slice, or says that it can't. */
export function areShown(state: AppState, volumes: PairVolumes | undefined): boolean {
  if (volumes === undefined) return false;
  return KERNELS.every((kernel) => {
    if (stackOf(state, kernel) === undefined) return true;
    const index = shownSlice(state, kernel)?.index;
    if (index === undefined || state.loading[kernel].gaps.has(index)) return true;
    return volumes[kernel]?.slice(index) !== undefined;
  });
}
