import type { VoiWindow } from '../../core/dicom/index.js';
import type { AppState } from '../state/appState.js';
import { setRange } from '../state/changes/compare.js';
import { setWindow } from '../state/changes/view.js';
import { clickSetsCaret } from './setCaret.js';
import type { Gesture, Tool, ToolPointer, ToolPort } from './tool.js';

/** A drag over this many CSS pixels doubles nothing and halves nothing: it moves by one width of the window. */
const PIXELS_PER_WIDTH = 400;

/**
 * The window after a drag: to the right wider, up brighter (a lower centre). Steps follow the width, so that a
 * narrow window is set as finely as a wide one. Whole units; the width never falls below 1 (PS3.3 C.11.2.1.2).
 */
export function draggedWindow(window: VoiWindow, rightPx: number, downPx: number): VoiWindow {
  const step = Math.max(window.width, 1) / PIXELS_PER_WIDTH;
  return {
    centre: Math.round(window.centre + downPx * step),
    width: Math.max(1, Math.round(window.width + rightPx * step)),
    function: window.function,
  };
}

/** On a difference the drag sets its scale: to the right wider. Its centre is zero and stays there. */
function rangeGesture(port: ToolPort, start: ToolPointer, before: AppState): Gesture {
  const { rangeHu } = before.compare;
  return {
    move: ({ point }) => {
      const right = (point.x - start.point.x) / PIXELS_PER_WIDTH;
      port.change('Scale of the difference', setRange(rangeHu * Math.exp(2 * right)));
    },
    complete: () => {},
    cancel: () => port.change('Scale as before', setRange(rangeHu)),
  };
}

export const windowTool: Tool = {
  id: 'window',
  click: clickSetsCaret,
  drag: (port, start) => {
    const before = port.now();
    const { kernel } = start;
    const window = before.plates[kernel].window;
    if (before.compare.way === 'difference') return rangeGesture(port, start, before);
    return {
      move: ({ point }) => {
        const right = point.x - start.point.x;
        const down = point.y - start.point.y;
        port.change('Window', setWindow(kernel, draggedWindow(window, right, down)));
      },
      complete: () => {},
      cancel: () => {
        port.change('Window as before', (state) => ({
          ...state,
          plates: {
            soft: { ...state.plates.soft, window: before.plates.soft.window },
            sharp: { ...state.plates.sharp, window: before.plates.sharp.window },
          },
        }));
      },
    };
  },
};
