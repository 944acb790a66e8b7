import type { Kernel } from '../../core/note/index.js';
import type { PlatePoint } from '../plates/platePoint.js';
import { type PlateTransform, plateToPatient } from '../plates/plateTransform.js';
import { setView } from '../state/changes/view.js';
import { plateScale, transformOf } from '../state/selectors.js';
import type { Change } from '../state/store.js';
import { clickSetsCaret } from './setCaret.js';
import type { Tool } from './tool.js';
import { viewAsIn } from './viewBefore.js';

/** A drag over this many CSS pixels makes the image e times larger or smaller. */
const PIXELS_PER_E = 160;

/** The plate's middle after a zoom by `factor` that leaves the place under `anchor` where it is. */
function zoomedMiddle(transform: PlateTransform, anchor: PlatePoint, factor: number): PlatePoint {
  const { widthPx, heightPx } = transform.size;
  return {
    x: anchor.x + (widthPx / 2 - anchor.x) / factor,
    y: anchor.y + (heightPx / 2 - anchor.y) / factor,
  };
}

/** Zooms a plate by a factor about a place on it; about its middle without one. */
export function zoomBy(kernel: Kernel, factor: number, anchor?: PlatePoint): Change {
  return (state) => {
    const transform = transformOf(state, kernel);
    const scale = plateScale(state, kernel);
    if (transform === undefined || scale === undefined) return state;
    const middle = { x: transform.size.widthPx / 2, y: transform.size.heightPx / 2 };
    const centre = plateToPatient(transform, zoomedMiddle(transform, anchor ?? middle, factor));
    return setView(kernel, centre, scale * factor)(state);
  };
}

/** Up enlarges, down reduces, about the place where the pointer went down. */
export const zoomTool: Tool = {
  id: 'zoom',
  click: clickSetsCaret,
  drag: (port, start) => {
    const before = port.now();
    return {
      move: ({ point }) => {
        const factor = Math.exp((start.point.y - point.y) / PIXELS_PER_E);
        port.change('Zoom', (state) =>
          zoomBy(start.kernel, factor, start.point)(viewAsIn(before)(state)),
        );
      },
      complete: () => {},
      cancel: () => port.change('View as before', viewAsIn(before)),
    };
  },
};
