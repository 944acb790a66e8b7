import { alongNormal } from '../../../core/geometry/index.js';
import { addEdge, changeEdge, type EdgeValues, removeEdge } from '../../../core/note/index.js';
import { type BandLine, findLineSlice, middleOf } from '../../../core/region/index.js';
import type { AppState } from '../appState.js';
import { editNote } from '../history.js';
import { selectedEdge, selectedLine } from '../lineSelectors.js';
import { takesMarks } from '../regionSelectors.js';
import { otherKernel, stackOf } from '../selectors.js';
import type { Change } from '../store.js';
import { scrollTo } from './view.js';

/** Puts a new edge line into the note, selects it and shows what it measures. */
export function placeEdge(line: BandLine, values: EdgeValues, now: string): Change {
  return (state) => {
    if (state.note === undefined) return state;
    const added = addEdge(state.note, line, values, now);
    const edited = editNote(`Draw ${added.edge.label}`, () => added.note)(state);
    if (edited.note !== added.note) return { ...edited, lineDraft: undefined };
    return {
      ...edited,
      selected: added.edge.id,
      lineDraft: undefined,
      lineEnd: undefined,
      plot: 'noise',
    };
  };
}

/** Gives an edge line another place. Changes with the same key that follow each other are undone as one. */
export function reshapeEdge(
  id: string,
  line: BandLine,
  values: EdgeValues,
  now: string,
  key?: string,
): Change {
  return (state) => {
    if (state.note === undefined) return state;
    const changed = changeEdge(state.note, id, line, values, now);
    if (!changed.ok) return { ...state, message: { tone: 'warning', text: changed.refusal.text } };
    const { note, edge } = changed.value;
    const edited = editNote(`Change ${edge.label}`, () => note, key)(state);
    return { ...edited, lineDraft: undefined };
  };
}

/** Removes the selected edge line; the state as it is where none is selected. */
export function removeSelectedEdge(now: string): Change {
  return (state) => {
    const edge = selectedEdge(state);
    if (edge === undefined) return state;
    const edited = editNote(`Delete ${edge.label}`, (note) => removeEdge(note, edge.id, now))(
      state,
    );
    if (edited.note === state.note) return edited;
    return {
      ...edited,
      selected: undefined,
      lineDraft: undefined,
      lineEnd: undefined,
      message: { tone: 'plain', text: `${edge.label} deleted. Undo brings it back.` },
    };
  };
}

/** Takes the plates to the selected line's slice. */
export function goToLine(state: AppState): AppState {
  const line = selectedLine(state);
  if (line === undefined) return state;
  for (const kernel of [state.active, otherKernel(state.active)]) {
    const stack = stackOf(state, kernel);
    if (stack === undefined || !takesMarks(state, kernel)) continue;
    const found = findLineSlice(line, stack);
    if (!found.ok) continue;
    const along = stack.slices[found.value.sliceIndex]?.alongMm;
    const { grid } = stack.slices[0].image;
    return scrollTo(kernel, along ?? alongNormal(grid, middleOf(line)))(state);
  }
  return {
    ...state,
    message: { tone: 'warning', text: `${line.label} lies on no slice of these stacks.` },
  };
}
