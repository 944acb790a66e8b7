import {
  beginRepeat,
  finishRepeat,
  giveUpRepeat,
  putRepeated,
  type RegionValues,
  runningRepeat,
  skipRepeated,
} from '../../../core/note/index.js';
import type { Shape } from '../../../core/region/index.js';
import type { AppState } from '../appState.js';
import { editNote } from '../history.js';
import { sliceOf } from '../regionSelectors.js';
import type { Change } from '../store.js';
import { leavePlane } from './cut.js';
import { scrollTo } from './view.js';

const NOTHING_SELECTED = {
  selected: undefined,
  draft: undefined,
  openOutline: undefined,
} as const;

/** Hides the first reading and asks for its first region again. */
export function startRepeat(reader: string, now: string): Change {
  return (state) => {
    if (state.note === undefined) return state;
    const begun = beginRepeat(state.note, { reader, now });
    if (!begun.ok) return { ...state, message: { tone: 'warning', text: begun.refusal.text } };
    // What is read again lies on the slices.
    return toNext(
      leavePlane({
        ...editNote('Begin a repeat reading', () => begun.value)(state),
        ...NOTHING_SELECTED,
      }),
    );
  };
}

/** Takes a drawn shape as the region that comes next, and goes on; after the last one the repeat is finished. */
export function placeRepeated(shape: Shape, values: RegionValues, now: string): Change {
  return (state) => {
    const next = state.note && runningRepeat(state.note)?.next;
    if (next === undefined) return state;
    const edited = editNote(`Read ${next.label} again`, (note) =>
      putRepeated(note, shape, values, now),
    )(state);
    return goOn({ ...edited, ...NOTHING_SELECTED }, now);
  };
}

/** Leaves the region that comes next out. */
export function skipNext(now: string): Change {
  return (state) => {
    const next = state.note && runningRepeat(state.note)?.next;
    if (next === undefined) return state;
    return goOn(editNote(`Skip ${next.label}`, (note) => skipRepeated(note, now))(state), now);
  };
}

/** Ends the repeat here; what was drawn stays. */
export function endRepeat(now: string): Change {
  return (state) => ({
    ...editNote('Finish the repeat reading', (note) => finishRepeat(note, now))(state),
    ...NOTHING_SELECTED,
    dialog: 'agreement',
  });
}

/** Takes the repeat back with all that was drawn. */
export function dropRepeat(now: string): Change {
  return (state) => ({
    ...editNote('Give the repeat reading up', (note) => giveUpRepeat(note, now))(state),
    ...NOTHING_SELECTED,
  });
}

function goOn(state: AppState, now: string): AppState {
  const running = state.note && runningRepeat(state.note);
  if (running === undefined) return state;
  return running.next === undefined ? endRepeat(now)(state) : toNext(state);
}

/** Goes to the slice of the region that comes next, and takes its role for what is drawn. */
function toNext(state: AppState): AppState {
  const next = state.note && runningRepeat(state.note)?.next;
  const stack = state.pair?.soft;
  if (next === undefined || stack === undefined) return state;
  const index = sliceOf(next.shape, stack);
  const alongMm = index === undefined ? undefined : stack.slices[index]?.alongMm;
  const ready: AppState = {
    ...state,
    role: next.role,
    tool: next.shape.kind === 'outline' ? 'outline' : 'ellipse',
  };
  return alongMm === undefined ? ready : scrollTo('soft', alongMm)(ready);
}
