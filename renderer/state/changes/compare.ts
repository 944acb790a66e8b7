import type { Kernel } from '../../../core/note/index.js';
import type { AppState, CompareWay } from '../appState.js';
import { compareProblem } from '../compareSelectors.js';
import { otherKernel } from '../selectors.js';
import type { Change } from '../store.js';
import { scrollTo, setView } from './view.js';

/** Bounds of the scale of differences, ± HU. */
export const RANGE_LIMITS_HU = [10, 3000] as const;

/** Chooses a way to compare; told why where the pair does not allow it. The other plate comes to where the active one is. */
export function setCompare(way: CompareWay): Change {
  return (state) => {
    const problem = compareProblem(state, way);
    if (problem !== undefined) {
      return { ...state, message: { tone: 'warning', text: problem } };
    }
    if (way === state.compare.way) return state;
    const compare = { ...state.compare, way, held: false, resting: 'soft' as const };
    const set: AppState = { ...state, compare, hover: undefined, draft: undefined };
    if (way === 'open') return set;
    const { alongMm, centreMm, scalePxPerMm } = state.plates[state.active];
    return setView(state.active, centreMm, scalePxPerMm)(scrollTo(state.active, alongMm)(set));
  };
}

/** Moves the edge of the fold, part of the plate's width. */
export function setFold(foldAt: number): Change {
  const bounded = Math.min(Math.max(foldAt, 0), 1);
  return (state) =>
    state.compare.foldAt === bounded
      ? state
      : { ...state, compare: { ...state.compare, foldAt: bounded } };
}

/** Alternate rests on a kernel until it is switched again. */
export function restOn(resting: Kernel): Change {
  return (state) => ({ ...state, active: resting, compare: { ...state.compare, resting } });
}

export const switchKernel: Change = (state) => restOn(otherKernel(state.compare.resting))(state);

/** The key that shows the other kernel is held, or was let go. */
export function holdOther(held: boolean): Change {
  return (state) => {
    if (state.compare.held === held || (held && state.compare.way !== 'alternate')) return state;
    return { ...state, compare: { ...state.compare, held } };
  };
}

/** Sets the scale of differences, ± whole HU. */
export function setRange(rangeHu: number): Change {
  const [least, most] = RANGE_LIMITS_HU;
  const bounded = Math.round(Math.min(Math.max(rangeHu, least), most));
  return (state) => ({ ...state, compare: { ...state.compare, rangeHu: bounded } });
}
