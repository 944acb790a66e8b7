import type { AppState } from '../state/appState.js';
import type { Change } from '../state/store.js';

/** Puts the middle and scale of both plates back to what they were in an earlier state. */
export function viewAsIn(before: AppState): Change {
  return (state) => ({
    ...state,
    plates: {
      soft: {
        ...state.plates.soft,
        centreMm: before.plates.soft.centreMm,
        scalePxPerMm: before.plates.soft.scalePxPerMm,
      },
      sharp: {
        ...state.plates.sharp,
        centreMm: before.plates.sharp.centreMm,
        scalePxPerMm: before.plates.sharp.scalePxPerMm,
      },
    },
  });
}
