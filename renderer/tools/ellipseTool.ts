import { transformOf } from '../state/selectors.js';
import { canMark } from './canMark.js';
import { drawnEllipse } from './drawnEllipse.js';
import { clickSetsCaret } from './setCaret.js';
import type { Tool } from './tool.js';

/** Draws an ellipse from corner to corner; with Shift a circle, with Alt from the middle outwards. */
export const ellipseTool: Tool = {
  id: 'ellipse',
  click: clickSetsCaret,
  drag: (port, start) => {
    const before = port.now();
    const { kernel } = start;
    const transform = transformOf(before, kernel);
    if (transform === undefined || !canMark(port, kernel)) return undefined;
    const shapeTo = (to: typeof start) =>
      drawnEllipse(transform, start.point, to.point, { round: to.shift, fromMiddle: to.alt });
    return {
      move: (pointer) => {
        port.change('Draw ellipse', (state) => ({
          ...state,
          active: kernel,
          selected: undefined,
          draft: { kernel, role: state.role, shape: shapeTo(pointer), regionId: undefined },
        }));
      },
      complete: (pointer) => port.placeRegion(port.now().role, shapeTo(pointer)),
      cancel: () => {
        port.change('Give the ellipse up', (state) => ({
          ...state,
          draft: undefined,
          selected: before.selected,
        }));
      },
    };
  },
};
