import {
  addStent,
  changeStent,
  removeStent,
  type StentPlacement,
  type StentValue,
} from '../../../core/note/index.js';
import { editNote } from '../history.js';
import { selectedStent } from '../stentSelectors.js';
import type { Change } from '../store.js';

/** Puts a stent into the note and selects it; its fit comes when it has been computed. */
export function placeStent(place: StentPlacement, now: string, findingId?: string | null): Change {
  return (state) => {
    if (state.note === undefined) return state;
    const { note, stent } = addStent(state.note, place, null, now, findingId ?? null);
    const edited = editNote(`Fit ${stent.label}`, () => note)(state);
    if (edited.note !== note) return edited;
    const text = `${stent.label} is being fitted on both kernels…`;
    return { ...edited, selected: stent.id, plot: 'stent', message: { tone: 'plain', text } };
  };
}

/** Gives a stent another place or nominal diameter; it is fitted anew. Keys as for regions. */
export function moveStent(
  id: string,
  place: StentPlacement,
  fit: StentValue | null,
  now: string,
  key?: string,
): Change {
  return (state) => {
    if (state.note === undefined) return state;
    const changed = changeStent(state.note, id, place, fit, now);
    if (!changed.ok) return { ...state, message: { tone: 'warning', text: changed.refusal.text } };
    const { note, stent } = changed.value;
    return editNote(`Change ${stent.label}`, () => note, key)(state);
  };
}

/** Removes the selected stent; the state as it is where none is selected. */
export function removeSelectedStent(now: string): Change {
  return (state) => {
    const stent = selectedStent(state);
    if (stent === undefined) return state;
    const edited = editNote(`Delete ${stent.label}`, (note) => removeStent(note, stent.id, now))(
      state,
    );
    if (edited.note === state.note) return edited;
    const text = `${stent.label} deleted. Undo brings it back.`;
    return { ...edited, selected: undefined, message: { tone: 'plain', text } };
  };
}
