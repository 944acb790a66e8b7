import { alongNormal, type Vec3 } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import { sliceIndexAt } from '../link/slicePosition.js';
import type { AppState } from '../state/appState.js';
import { takesMarks } from '../state/regionSelectors.js';
import { shownSlice, stackOf, transformOf } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import { type PlateTransform, patientToPlate } from './plateTransform.js';

/** The courses of oblique cuts on the slices: their points where they lie on this slice, and the line between both. */
export function CourseMarks({ kernel, store }: { readonly kernel: Kernel; readonly store: Store }) {
  const state = store.state.value;
  const transform = transformOf(state, kernel);
  if (transform === undefined || state.cut !== undefined || !takesMarks(state, kernel)) return null;
  const { courseStart, note } = state;
  return (
    <g>
      {(note?.planes ?? []).map(({ id, label, courseMm }) => (
        <Course
          key={id}
          id={id}
          label={label}
          points={courseMm.filter((point) => isHere(state, kernel, point))}
          transform={transform}
        />
      ))}
      {courseStart !== undefined && isHere(state, kernel, courseStart.pointMm) && (
        <Course id="" label="" points={[courseStart.pointMm]} transform={transform} />
      )}
    </g>
  );
}

function Course({
  id,
  label,
  points,
  transform,
}: {
  readonly id: string;
  readonly label: string;
  readonly points: readonly Vec3[];
  readonly transform: PlateTransform;
}) {
  const places = points.map((point) => patientToPlate(transform, point));
  const [from, to] = places;
  if (from === undefined) return null;
  return (
    <g class="course-mark" data-plane={id}>
      {to !== undefined && <path d={`M${from.x} ${from.y}L${to.x} ${to.y}`} />}
      {places.map(({ x, y }) => (
        <path key={`${x} ${y}`} class="course-point" d={`M${x - 5} ${y}l5 -5 5 5 -5 5z`} />
      ))}
      <text x={from.x + 8} y={from.y - 6}>
        {label}
      </text>
    </g>
  );
}

/** Whether a point lies on the slice that a plate shows. */
function isHere(state: AppState, kernel: Kernel, point: Vec3): boolean {
  const stack = stackOf(state, kernel);
  const shown = shownSlice(state, kernel);
  if (stack === undefined || shown === undefined) return false;
  return sliceIndexAt(stack, alongNormal(stack.slices[0].image.grid, point)) === shown.index;
}
