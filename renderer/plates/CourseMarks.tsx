import type { Vec3 } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import { courseEndsOn, isOnSlice } from '../state/courseSelectors.js';
import { transformOf } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import { type PlateTransform, patientToPlate } from './plateTransform.js';

/** The courses of oblique cuts on the slices: their ends where they lie on this slice, and the line between both. */
export function CourseMarks({ kernel, store }: { readonly kernel: Kernel; readonly store: Store }) {
  const state = store.state.value;
  const transform = transformOf(state, kernel);
  if (transform === undefined || state.cut !== undefined) return null;
  const { courseStart, note } = state;
  const ends = courseEndsOn(state, kernel);
  return (
    <g>
      {(note?.planes ?? []).map(({ id, label }) => (
        <Course
          key={id}
          id={id}
          label={label}
          points={ends.filter(({ plane }) => plane.id === id).map(({ pointMm }) => pointMm)}
          transform={transform}
        />
      ))}
      {courseStart !== undefined && isOnSlice(state, kernel, courseStart.pointMm) && (
        <Course id="" label="" points={[courseStart.pointMm]} transform={transform} />
      )}
    </g>
  );
}

interface CourseProps {
  readonly id: string;
  readonly label: string;
  readonly points: readonly Vec3[];
  readonly transform: PlateTransform;
}

function Course({ id, label, points, transform }: CourseProps) {
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
