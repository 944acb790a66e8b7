import type { Kernel, NoteStent } from '../../core/note/index.js';
import { findSlice, type Shape } from '../../core/region/index.js';
import type { AppState } from './appState.js';
import { isBlind, isOnSurface, takesMarks } from './regionSelectors.js';
import { plateGrid, shownSlice, stackOf } from './selectors.js';

/** Radius of the mark of a stent that has no fit, mm. */
const BARE_RADIUS_MM = 1.5;

export function selectedStent(state: Pick<AppState, 'note' | 'selected'>): NoteStent | undefined {
  return isBlind(state) ? undefined : state.note?.stents.find(({ id }) => id === state.selected);
}

/** The circle of a stent on a plate's plane: of the struts where it was fitted, else of its nominal size. */
export function stentCircle(
  state: AppState,
  kernel: Kernel,
  { centreMm, nominalMm, fit }: NoteStent,
): (Shape & { readonly kind: 'ellipse' }) | undefined {
  const grid = plateGrid(state, kernel);
  if (grid === undefined) return undefined;
  const diameterMm = fit?.strutDiameterMm?.value ?? nominalMm;
  const radiusMm = diameterMm === undefined ? BARE_RADIUS_MM : diameterMm / 2;
  return {
    kind: 'ellipse',
    centreMm: fit?.axisMm ?? centreMm,
    u: grid.rowDirection,
    v: grid.columnDirection,
    radiiMm: [radiusMm, radiusMm],
  };
}

/** The stents that lie on what a plate shows, in the order of making. */
export function stentsOn(state: AppState, kernel: Kernel): readonly NoteStent[] {
  const stack = stackOf(state, kernel);
  const shown = shownSlice(state, kernel);
  if (state.note === undefined || stack === undefined || shown === undefined) return [];
  if (isBlind(state) || !takesMarks(state, kernel)) return [];
  return state.note.stents.filter((stent) => {
    if (!isOnSurface(state, stent)) return false;
    const circle = stentCircle(state, kernel, { ...stent, fit: null });
    const found = circle && findSlice(circle, stack);
    return found?.ok === true && found.value.sliceIndex === shown.index;
  });
}
