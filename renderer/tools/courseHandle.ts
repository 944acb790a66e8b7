import { add, subtract, type Vec3 } from '../../core/geometry/index.js';
import type { Kernel, NotePlane } from '../../core/note/index.js';
import { patientToPlate, plateToPatient } from '../plates/plateTransform.js';
import type { AppState } from '../state/appState.js';
import { courseEndsOn } from '../state/courseSelectors.js';
import { transformOf } from '../state/selectors.js';
import type { Tool, ToolPointer } from './tool.js';

const HANDLE_PX = 7;

/** An end of a course that a press takes hold of. */
export interface CourseHit {
  readonly plane: NotePlane;
  readonly end: 0 | 1;
}

/** The end of an oblique cut's course under a pointer. */
export function courseAt(
  state: AppState,
  { kernel, point }: { readonly kernel: Kernel; readonly point: ToolPointer['point'] },
): CourseHit | undefined {
  const transform = transformOf(state, kernel);
  if (transform === undefined) return undefined;
  return courseEndsOn(state, kernel).find(({ pointMm }) => {
    const { x, y } = patientToPlate(transform, pointMm);
    return Math.hypot(x - point.x, y - point.y) <= HANDLE_PX;
  });
}

/** Drags an end of a course: the oblique plane follows, as long as nothing is measured on it. A click shows the cut. */
export function courseHandleTool({ plane, end }: CourseHit): Tool {
  return {
    id: 'course-handle',
    click: (port) => port.showPlane(plane.id),
    drag: (port, start) => {
      const transform = transformOf(port.now(), start.kernel);
      if (transform === undefined) return undefined;
      const from = plateToPatient(transform, start.point);
      return {
        move: () => {},
        complete: ({ point }) => {
          const by = subtract(plateToPatient(transform, point), from);
          const moved = (index: 0 | 1): Vec3 =>
            index === end ? add(plane.courseMm[index], by) : plane.courseMm[index];
          port.movePlane(plane.id, [moved(0), moved(1)]);
        },
        cancel: () => {},
      };
    },
  };
}
