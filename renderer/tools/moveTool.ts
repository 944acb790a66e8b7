import { plateToPatient } from '../plates/plateTransform.js';
import { setView } from '../state/changes/view.js';
import { plateScale, transformOf } from '../state/selectors.js';
import { clickSetsCaret } from './setCaret.js';
import type { Tool } from './tool.js';
import { viewAsIn } from './viewBefore.js';

/** Moves the image with the pointer. */
export const moveTool: Tool = {
  id: 'move',
  click: clickSetsCaret,
  drag: (port, start) => {
    const before = port.now();
    const { kernel } = start;
    const transform = transformOf(before, kernel);
    const scale = plateScale(before, kernel);
    if (transform === undefined || scale === undefined) return undefined;
    const { widthPx, heightPx } = transform.size;
    return {
      move: ({ point }) => {
        const middle = {
          x: widthPx / 2 - (point.x - start.point.x),
          y: heightPx / 2 - (point.y - start.point.y),
        };
        port.change('Move', setView(kernel, plateToPatient(transform, middle), scale));
      },
      complete: () => {},
      cancel: () => port.change('View as before', viewAsIn(before)),
    };
  },
};
