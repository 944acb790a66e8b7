import type { Kernel, NoteEdge, NoteProfile } from '../../core/note/index.js';
import { type BandLine, findLineSlice } from '../../core/region/index.js';
import type { AppState, LinePurpose } from './appState.js';
import { isBlind, isOnSurface, takesMarks } from './regionSelectors.js';
import { shownSlice, stackOf } from './selectors.js';

/** A line of the note on the plates, whatever it is for. */
export interface MarkedLine extends BandLine {
  readonly id: string;
  readonly label: string;
  readonly purpose: LinePurpose;
  /** The oblique plane that it lies on; undefined on the slices. */
  readonly plane?: string;
  /** Nominal inner diameter of a profile. */
  readonly nominalMm?: number;
}

/** All lines of the note, in the order of making. */
export function markedLines({ note }: Pick<AppState, 'note'>): readonly MarkedLine[] {
  if (note === undefined || isBlind({ note })) return [];
  return [
    ...note.edges.map((edge): MarkedLine => ({ ...edge, purpose: 'edge' })),
    ...note.profiles.map((profile): MarkedLine => ({ ...profile, purpose: 'profile' })),
  ];
}

/** True when a line lies on the slice that a plate shows. */
export function isLineOnPlate(state: AppState, kernel: Kernel, line: BandLine): boolean {
  const stack = stackOf(state, kernel);
  const shown = shownSlice(state, kernel);
  if (stack === undefined || shown === undefined || !takesMarks(state, kernel)) return false;
  const found = findLineSlice(line, stack);
  return found.ok && found.value.sliceIndex === shown.index;
}

/** The lines that lie on the slice that a plate shows. */
export function linesOn(state: AppState, kernel: Kernel): readonly MarkedLine[] {
  return markedLines(state).filter(
    (line) => isOnSurface(state, line) && isLineOnPlate(state, kernel, line),
  );
}

export function selectedLine(state: Pick<AppState, 'note' | 'selected'>): MarkedLine | undefined {
  return markedLines(state).find(({ id }) => id === state.selected);
}

export function selectedEdge(state: Pick<AppState, 'note' | 'selected'>): NoteEdge | undefined {
  return state.note?.edges.find(({ id }) => id === state.selected);
}

export function selectedProfile(
  state: Pick<AppState, 'note' | 'selected'>,
): NoteProfile | undefined {
  return isBlind(state) ? undefined : state.note?.profiles.find(({ id }) => id === state.selected);
}
