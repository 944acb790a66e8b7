import type { Gesture, Tool, ToolPointer, ToolPort } from './tool.js';

/** A pointer that has moved less than this far is still clicking, CSS pixels. */
export const DRAG_THRESHOLD_PX = 3;

type MachineState =
  | { readonly name: 'idle' }
  | { readonly name: 'pointing'; readonly tool: Tool; readonly start: ToolPointer }
  | {
      readonly name: 'dragging';
      readonly tool: Tool;
      readonly gesture: Gesture;
      readonly last: ToolPointer;
    };

/** The state machine that all pointer tools share: idle → pointing → dragging, with five exits. */
export interface ToolMachine {
  /** 'idle', 'ellipse.pointing', 'ellipse.dragging'. */
  path(): string;
  down(pointer: ToolPointer): void;
  move(pointer: ToolPointer): void;
  up(pointer: ToolPointer): void;
  /** Shift or Alt went down or up in the middle of a drag. */
  modifiers(held: Pick<ToolPointer, 'shift' | 'alt'>): void;
  /** Esc. True when there was something to cancel. */
  cancel(): boolean;
  /** The pointer was lost, or the slice under it changed. */
  interrupt(): void;
}

/** @param toolAt the tool that a press at this place uses: the chosen one, or the handles of a region. */
export function createToolMachine(
  port: ToolPort,
  toolAt: (pointer: ToolPointer) => Tool,
): ToolMachine {
  let state: MachineState = { name: 'idle' };

  const begin = (tool: Tool, start: ToolPointer, pointer: ToolPointer): void => {
    const gesture = tool.drag(port, start);
    if (gesture === undefined) {
      state = { name: 'idle' };
      return;
    }
    state = { name: 'dragging', tool, gesture, last: pointer };
    gesture.move(pointer);
  };

  const stop = (): boolean => {
    const before = state;
    state = { name: 'idle' };
    if (before.name === 'dragging') before.gesture.cancel();
    return before.name !== 'idle';
  };

  return {
    path: () => (state.name === 'idle' ? 'idle' : `${state.tool.id}.${state.name}`),
    down: (pointer) => {
      if (state.name !== 'idle') stop();
      state = { name: 'pointing', tool: toolAt(pointer), start: pointer };
    },
    move: (pointer) => {
      if (state.name === 'pointing') {
        const { start, tool } = state;
        const { x, y } = start.point;
        const farPx = Math.hypot(pointer.point.x - x, pointer.point.y - y);
        if (farPx >= DRAG_THRESHOLD_PX) begin(tool, start, pointer);
      } else if (state.name === 'dragging') {
        state = { ...state, last: pointer };
        state.gesture.move(pointer);
      }
    },
    up: (pointer) => {
      const before = state;
      state = { name: 'idle' };
      if (before.name === 'pointing') before.tool.click(port, before.start);
      if (before.name === 'dragging') before.gesture.complete(pointer);
    },
    modifiers: (held) => {
      if (state.name !== 'dragging') return;
      const last = { ...state.last, ...held };
      state = { ...state, last };
      state.gesture.move(last);
    },
    cancel: stop,
    interrupt: () => {
      stop();
    },
  };
}
