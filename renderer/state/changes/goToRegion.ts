import { alongNormal } from '../../../core/geometry/index.js';
import type { NoteStent } from '../../../core/note/index.js';
import type { Cuts } from '../../volumes/cuts.js';
import type { AppState } from '../appState.js';
import { isBlind, selectedRegion, sliceOf, takesMarks } from '../regionSelectors.js';
import { otherKernel, stackOf } from '../selectors.js';
import { selectedStent } from '../stentSelectors.js';
import type { Change } from '../store.js';
import { leavePlane, showPlane } from './cut.js';
import { goToLine } from './lines.js';
import { scrollTo } from './view.js';

/**
 * Takes the plates to what is selected: to its oblique plane, or to its slice, the active plate where it lies on it, else
 * the other.
 */
export function goToRegion(cuts: Pick<Cuts, 'of'>): Change {
  return (state) => {
    const { note, selected } = state;
    if (note === undefined || selected === undefined || isBlind(state)) return state;
    const items = [...note.regions, ...note.edges, ...note.profiles, ...note.stents];
    const item = items.find(({ id }) => id === selected);
    if (item === undefined) return state;
    if (item.plane === undefined) return goToSlice(leavePlane(state));
    return item.plane === state.cut?.planeId ? state : showPlane(item.plane, cuts)(state);
  };
}

function goToSlice(state: AppState): AppState {
  const stent = selectedStent(state);
  if (stent !== undefined) return goToPlace(stent, state);
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

function goToPlace({ centreMm }: NoteStent, state: AppState): AppState {
  const stack = stackOf(state, 'soft');
  if (stack === undefined) return state;
  return scrollTo('soft', alongNormal(stack.slices[0].image.grid, centreMm))(state);
}
