import type { Vec3 } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import { plateToPatient } from '../plates/plateTransform.js';
import { transformOf } from '../state/selectors.js';
import { canMark } from './canMark.js';
import type { Tool, ToolPort } from './tool.js';

/** Fits a stent where the lumen is clicked. A press that slips is a click all the same. */
export const stentTool: Tool = {
  id: 'stent',
  click: (port, { kernel, point }) => {
    const transform = transformOf(port.now(), kernel);
    if (transform !== undefined) fitStentAt(port, kernel, plateToPatient(transform, point));
  },
  drag: (port, { kernel, point }) => {
    const transform = transformOf(port.now(), kernel);
    if (transform === undefined || !canMark(port, kernel)) return undefined;
    const pointMm = plateToPatient(transform, point);
    return {
      move: () => {},
      complete: () => fitStentAt(port, kernel, pointMm),
      cancel: () => {},
    };
  },
};

/** Puts a stent into the note at a place in the lumen, where one can be marked. */
export function fitStentAt(port: ToolPort, kernel: Kernel, pointMm: Vec3): void {
  if (!canMark(port, kernel)) return;
  port.change('Point', (state) => ({ ...state, active: kernel }));
  port.placeStent(pointMm);
}
