import type { Kernel } from '../../core/note/index.js';
import type { PlatePoint } from '../plates/platePoint.js';
import { plateToPatient } from '../plates/plateTransform.js';
import { transformOf } from '../state/selectors.js';
import type { Change } from '../state/store.js';
import type { Tool } from './tool.js';

/** Puts the crosshair where a plate was clicked, and selects nothing. */
export function setCaretAt(kernel: Kernel, point: PlatePoint): Change {
  return (state) => {
    const transform = transformOf(state, kernel);
    if (transform === undefined) return state;
    return {
      ...state,
      active: kernel,
      selected: undefined,
      caret: { kernel, pointMm: plateToPatient(transform, point) },
    };
  };
}

/** What a click on bare image does with every tool that has no use of its own for it. */
export const clickSetsCaret: Tool['click'] = (port, { kernel, point }) => {
  port.change('Point', setCaretAt(kernel, point));
};
