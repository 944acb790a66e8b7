import { distance, type Vec3 } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import { plateToPatient } from '../plates/plateTransform.js';
import type { AppState } from '../state/appState.js';
import { transformOf } from '../state/selectors.js';
import { canMark } from './canMark.js';
import { LEAST_LINE_MM } from './lineOnPlate.js';
import type { Tool, ToolPort } from './tool.js';

/**
 * Sets the course of a vessel: two clicks, as a rule on two slices, or one drag along a vessel that lies in the slice. The
 * oblique plane stands at right angles to the course, in its middle.
 */
export const cutTool: Tool = {
  id: 'cut',
  click: (port, { kernel, point }) => {
    const transform = transformOf(port.now(), kernel);
    if (transform !== undefined) setCoursePoint(port, kernel, plateToPatient(transform, point));
  },
  drag: (port, start) => {
    const { kernel } = start;
    const transform = transformOf(port.now(), kernel);
    if (transform === undefined || !canCut(port, kernel)) return undefined;
    const fromMm = plateToPatient(transform, start.point);
    const begun = port.now().courseStart;
    return {
      move: () =>
        port.change('Draw the course', (state) => ({
          ...state,
          active: kernel,
          courseStart: { kernel, pointMm: fromMm },
        })),
      complete: ({ point }) => {
        const toMm = plateToPatient(transform, point);
        if (distance(fromMm, toMm) >= LEAST_LINE_MM) port.placePlane([fromMm, toMm]);
        else setCoursePoint(port, kernel, fromMm);
      },
      cancel: () =>
        port.change('Give the course up', (state) => ({ ...state, courseStart: begun })),
    };
  },
};

/** Sets the first point of a course, or with the second one makes the cut. */
export function setCoursePoint(port: ToolPort, kernel: Kernel, pointMm: Vec3): void {
  if (!canCut(port, kernel)) return;
  const { courseStart } = port.now();
  if (courseStart !== undefined && distance(courseStart.pointMm, pointMm) > 0) {
    port.placePlane([courseStart.pointMm, pointMm]);
    return;
  }
  port.change('Begin a course', (state) => ({
    ...state,
    active: kernel,
    selected: undefined,
    caret: { kernel, pointMm },
    courseStart: { kernel, pointMm },
    message: { tone: 'plain', text: COURSE_BEGUN },
  }));
}

const COURSE_BEGUN =
  'Scroll along the vessel and click its middle again: the cut stands across the line between both points. Esc gives it up.';
const ON_A_CUT = 'Go back to the slices to set another course.';

function canCut(port: ToolPort, kernel: Kernel): boolean {
  if (!canMark(port, kernel)) return false;
  if (port.now().cut === undefined) return true;
  port.change('Can’t cut', (state: AppState) => ({
    ...state,
    message: { tone: 'warning', text: ON_A_CUT },
  }));
  return false;
}
