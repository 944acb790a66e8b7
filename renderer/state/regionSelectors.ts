import { type Kernel, type NoteRegion, runningRepeat } from '../../core/note/index.js';
import { findSlice, type Shape } from '../../core/region/index.js';
import { isUnscaled, type Stack } from '../../core/stack/index.js';
import type { AppState } from './appState.js';
import { shownSlice, stackOf } from './selectors.js';

/** Slice of a stack that a shape lies on, remembered: shapes and stacks are never changed in place. */
const remembered = new WeakMap<Shape, WeakMap<Stack, number>>();

/** Index of the slice that a shape lies on; undefined when it lies on none. */
export function sliceOf(shape: Shape, stack: Stack): number | undefined {
  const known = remembered.get(shape) ?? new WeakMap<Stack, number>();
  remembered.set(shape, known);
  const before = known.get(stack);
  if (before !== undefined) return before < 0 ? undefined : before;
  const found = findSlice(shape, stack);
  known.set(stack, found.ok ? found.value.sliceIndex : -1);
  return found.ok ? found.value.sliceIndex : undefined;
}

/**
 * Whether marks can be seen on a plate: always on the soft one; on the sharp one only when positions can be
 * compared, since marks lie in the soft stack's space.
 */
export function takesMarks(state: AppState, kernel: Kernel): boolean {
  const stack = stackOf(state, kernel);
  if (stack !== undefined && isUnscaled(stack)) return false;
  return kernel === 'soft' || state.pair?.link === 'position';
}

/** True when a shape lies on the slice that a plate shows. */
export function isOnPlate(state: AppState, kernel: Kernel, shape: Shape): boolean {
  const stack = stackOf(state, kernel);
  const shown = shownSlice(state, kernel);
  if (stack === undefined || shown === undefined || !takesMarks(state, kernel)) return false;
  return sliceOf(shape, stack) === shown.index;
}

/** The regions that lie on the slice that a plate shows, in the order of making. */
export function regionsOn(state: AppState, kernel: Kernel): readonly NoteRegion[] {
  return shownRegions(state).filter(
    (region) => isOnSurface(state, region) && isOnPlate(state, kernel, region.shape),
  );
}

/** Whether something of the note lies on what the plates show: the slices, or one oblique plane. */
export function isOnSurface(
  { cut }: Pick<AppState, 'cut'>,
  { plane }: { readonly plane?: string | undefined },
): boolean {
  return plane === cut?.planeId;
}

/** Whether the first reading is hidden, because the reader reads the regions again. */
export function isBlind({ note }: Pick<AppState, 'note'>): boolean {
  return note !== undefined && runningRepeat(note) !== undefined;
}

/** The regions that may be shown: none of the first reading while it is read again. */
export function shownRegions(state: Pick<AppState, 'note'>): readonly NoteRegion[] {
  return isBlind(state) ? [] : (state.note?.regions ?? []);
}

export function selectedRegion(state: Pick<AppState, 'note' | 'selected'>): NoteRegion | undefined {
  return shownRegions(state).find(({ id }) => id === state.selected);
}
