import { alongNormal, type Vec3 } from '../../core/geometry/index.js';
import type { Kernel, NotePlane } from '../../core/note/index.js';
import { sliceIndexAt } from '../link/slicePosition.js';
import type { AppState } from './appState.js';
import { isBlind, takesMarks } from './regionSelectors.js';
import { shownSlice, stackOf } from './selectors.js';

/** An end of an oblique cut's course that lies on the slice that a plate shows. */
export interface CourseEnd {
  readonly plane: NotePlane;
  readonly end: 0 | 1;
  readonly pointMm: Vec3;
}

/** The ends of all courses on a plate's slice; none on an oblique cut. */
export function courseEndsOn(state: AppState, kernel: Kernel): readonly CourseEnd[] {
  if (state.cut !== undefined || isBlind(state)) return [];
  return (state.note?.planes ?? []).flatMap((plane) =>
    ([0, 1] as const).flatMap((end) => {
      const pointMm = plane.courseMm[end];
      return isOnSlice(state, kernel, pointMm) ? [{ plane, end, pointMm }] : [];
    }),
  );
}

/** Whether a point lies on the slice that a plate shows. */
export function isOnSlice(state: AppState, kernel: Kernel, pointMm: Vec3): boolean {
  const stack = stackOf(state, kernel);
  const shown = shownSlice(state, kernel);
  if (stack === undefined || shown === undefined || !takesMarks(state, kernel)) return false;
  return sliceIndexAt(stack, alongNormal(stack.slices[0].image.grid, pointMm)) === shown.index;
}
