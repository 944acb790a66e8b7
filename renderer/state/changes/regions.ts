import {
  addRegion,
  changeRegion,
  type RegionValues,
  removeRegion,
} from '../../../core/note/index.js';
import type { Role, Shape } from '../../../core/region/index.js';
import type { AppState } from '../appState.js';
import { editNote } from '../history.js';
import { isBlind, selectedRegion, shownRegions } from '../regionSelectors.js';
import type { Change } from '../store.js';
import { removeSelectedLine } from './lines.js';
import { placeRepeated } from './repeat.js';
import { removeSelectedStent } from './stents.js';

/** Puts a new region into the note and selects it. */
export function placeRegion(
  role: Role,
  shape: Shape,
  values: RegionValues,
  now: string,
  plane?: string,
): Change {
  return (state) => {
    if (state.note === undefined) return state;
    if (isBlind(state)) return placeRepeated(shape, values, now)(state);
    const added = addRegion(state.note, { role, shape, ...onPlane(plane), ...values }, now);
    const edited = editNote(`Mark ${added.region.label}`, () => added.note)(state);
    return { ...edited, selected: added.region.id, draft: undefined, openOutline: undefined };
  };
}

function onPlane(plane: string | undefined): { readonly plane?: string } {
  return plane === undefined ? {} : { plane };
}

/** Gives a region another shape. Changes with the same key that follow each other are undone as one. */
export function reshapeRegion(
  id: string,
  shape: Shape,
  values: RegionValues,
  now: string,
  key?: string,
): Change {
  return (state) => {
    if (state.note === undefined) return state;
    const changed = changeRegion(state.note, id, { shape, values }, now);
    if (!changed.ok) return { ...state, message: { tone: 'warning', text: changed.refusal.text } };
    const { note, region } = changed.value;
    return { ...editNote(`Change ${region.label}`, () => note, key)(state), draft: undefined };
  };
}

/** Removes the selected region; the message says which contrasts went with it. */
export function removeSelected(now: string): Change {
  return (state) => {
    const region = selectedRegion(state);
    if (state.note === undefined || region === undefined) {
      return removeSelectedStent(now)(removeSelectedLine(now)(state));
    }
    const { note, removedContrasts } = removeRegion(state.note, region.id, now);
    const edited = editNote(`Delete ${region.label}`, () => note)(state);
    // A verified note keeps its regions, and the reader is told.
    if (edited.note !== note) return edited;
    const gone = removedContrasts.map(({ id }) => id).join(', ');
    return {
      ...edited,
      selected: undefined,
      draft: undefined,
      message: {
        tone: 'plain',
        text:
          gone === ''
            ? `${region.label} deleted. Undo brings it back.`
            : `${region.label} deleted, and with it contrast ${gone}. Undo brings them back.`,
      },
    };
  };
}

export function selectRegion(id: string | undefined): Change {
  return (state) =>
    state.selected === id
      ? state
      : { ...state, selected: id, draft: undefined, lineEnd: undefined };
}

/** Selects the next or the previous region in the order of making; from none, the first or the last. */
export function stepSelection(step: 1 | -1): Change {
  return (state) => {
    const ids = shownRegions(state).map(({ id }) => id);
    if (ids.length === 0) return state;
    const at = state.selected === undefined ? -1 : ids.indexOf(state.selected);
    const next = at < 0 ? (step > 0 ? 0 : ids.length - 1) : (at + step + ids.length) % ids.length;
    return { ...state, selected: ids[next], draft: undefined };
  };
}

/** Sets the role of the marks to come, and of the one being drawn. */
export function setRole(role: Role): Change {
  return (state: AppState) => ({
    ...state,
    role,
    draft:
      state.draft !== undefined && state.draft.regionId === undefined
        ? { ...state.draft, role }
        : state.draft,
    openOutline: state.openOutline === undefined ? undefined : { ...state.openOutline, role },
  });
}
