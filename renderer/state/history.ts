import type { Note } from '../../core/note/index.js';
import { isSealed } from '../../core/note/life/index.js';
import type { AppState, History } from './appState.js';
import type { Change } from './store.js';

/** Steps that can be taken back. More would keep notes that nobody goes back to. */
const DEPTH = 200;

/** What a reader is told who wants to change a verified note. */
export const VERIFIED = 'This note is verified. To change it, amend it (Note menu).';

/**
 * A change of the note that can be undone under the name `label`. Its inverse is the note before it. With
 * a `key`, a change that follows one of the same key joins it, so that ten nudges are undone as one.
 */
export function editNote(label: string, edit: (note: Note) => Note, key?: string): Change {
  return (state) => {
    const before = state.note;
    if (before === undefined) return state;
    if (isSealed(before)) {
      return { ...state, message: { tone: 'warning', text: VERIFIED } };
    }
    const after = edit(before);
    if (after === before) return state;
    return { ...state, note: after, history: remember(state.history, label, before, key) };
  };
}

function remember(history: History, label: string, note: Note, key: string | undefined): History {
  const last = history.undo.at(-1);
  if (key !== undefined && last?.key === key && history.redo.length === 0) return history;
  return { undo: [...history.undo, { label, note, key }].slice(-DEPTH), redo: [] };
}

/** Takes the last change of the note back; the state as it is when there is none. */
export function undo(state: AppState): AppState {
  const last = state.history.undo.at(-1);
  if (last === undefined || state.note === undefined || isSealed(state.note)) return state;
  return withSelection({
    ...state,
    note: last.note,
    history: {
      undo: state.history.undo.slice(0, -1),
      redo: [...state.history.redo, { ...last, note: state.note }],
    },
  });
}

/** Makes the change again that was taken back last. */
export function redo(state: AppState): AppState {
  const last = state.history.redo.at(-1);
  if (last === undefined || state.note === undefined || isSealed(state.note)) return state;
  return withSelection({
    ...state,
    note: last.note,
    history: {
      undo: [...state.history.undo, { ...last, note: state.note }],
      redo: state.history.redo.slice(0, -1),
    },
  });
}

/** A selection whose region is gone selects nothing, and an oblique plane that is gone shows the slices. */
export function withSelection(given: AppState): AppState {
  const state = withCutPresent(given);
  const { selected, note } = state;
  if (selected === undefined) return state;
  const present =
    note !== undefined &&
    [...note.regions, ...note.edges, ...note.profiles, ...note.stents].some(
      ({ id }) => id === selected,
    );
  return present ? state : { ...state, selected: undefined };
}

function withCutPresent(state: AppState): AppState {
  const { cut, note } = state;
  if (cut === undefined || note?.planes.some(({ id }) => id === cut.planeId)) return state;
  return { ...state, cut: undefined, plates: cut.before };
}
