import { alongNormal } from '../../../core/geometry/index.js';
import {
  addEdge,
  addProfile,
  changeEdge,
  changeProfile,
  type EdgeValues,
  type Note,
  type PlacedProfile,
  type ProfileValues,
  removeEdge,
  removeProfile,
} from '../../../core/note/index.js';
import { type BandLine, findLineSlice, middleOf } from '../../../core/region/index.js';
import type { Result } from '../../../core/result.js';
import type { AppState, PlotId } from '../appState.js';
import { editNote } from '../history.js';
import { selectedLine } from '../lineSelectors.js';
import { takesMarks } from '../regionSelectors.js';
import { otherKernel, stackOf } from '../selectors.js';
import type { Change } from '../store.js';
import { scrollTo } from './view.js';

/** A line of the note by its name. */
interface Named {
  readonly id: string;
  readonly label: string;
}

/** Puts a new edge line into the note, selects it and shows what it measures. */
export function placeEdge(
  line: BandLine & { readonly plane?: string | undefined },
  values: EdgeValues,
  now: string,
): Change {
  return placed('noise', (note) => {
    const { note: after, edge } = addEdge(note, line, values, now);
    return { note: after, line: edge };
  });
}

/** Puts a new profile into the note, selects it and shows it. */
export function placeProfile(line: PlacedProfile, values: ProfileValues, now: string): Change {
  return placed('stent', (note) => {
    const { note: after, profile } = addProfile(note, line, values, now);
    return { note: after, line: profile };
  });
}

function placed(
  plot: PlotId,
  add: (note: Note) => { readonly note: Note; readonly line: Named },
): Change {
  return (state) => {
    if (state.note === undefined) return state;
    const { note, line } = add(state.note);
    const edited = editNote(`Draw ${line.label}`, () => note)(state);
    if (edited.note !== note) return { ...edited, lineDraft: undefined };
    return { ...edited, selected: line.id, lineDraft: undefined, lineEnd: undefined, plot };
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
  return reshaped(key, (note) => {
    const changed = changeEdge(note, id, line, values, now);
    return changed.ok
      ? { ok: true, value: { note: changed.value.note, line: changed.value.edge } }
      : changed;
  });
}

/** Gives a profile another place, band or nominal diameter; keys as for edge lines. */
export function reshapeProfile(
  id: string,
  line: PlacedProfile,
  values: ProfileValues,
  now: string,
  key?: string,
): Change {
  return reshaped(key, (note) => {
    const changed = changeProfile(note, id, line, values, now);
    return changed.ok
      ? { ok: true, value: { note: changed.value.note, line: changed.value.profile } }
      : changed;
  });
}

function reshaped(
  key: string | undefined,
  change: (note: Note) => Result<{ readonly note: Note; readonly line: Named }>,
): Change {
  return (state) => {
    if (state.note === undefined) return state;
    const changed = change(state.note);
    if (!changed.ok) return { ...state, message: { tone: 'warning', text: changed.refusal.text } };
    const { note, line } = changed.value;
    const edited = editNote(`Change ${line.label}`, () => note, key)(state);
    return { ...edited, lineDraft: undefined };
  };
}

/** Removes the selected line; the state as it is where none is selected. */
export function removeSelectedLine(now: string): Change {
  return (state) => {
    const line = selectedLine(state);
    if (line === undefined) return state;
    const remove = line.purpose === 'edge' ? removeEdge : removeProfile;
    const edited = editNote(`Delete ${line.label}`, (note) => remove(note, line.id, now))(state);
    if (edited.note === state.note) return edited;
    return {
      ...edited,
      selected: undefined,
      lineDraft: undefined,
      lineEnd: undefined,
      message: { tone: 'plain', text: `${line.label} deleted. Undo brings it back.` },
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
