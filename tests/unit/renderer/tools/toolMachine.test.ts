import { describe, expect, it } from 'vitest';
import type { Tool, ToolPort } from '../../../../renderer/tools/tool.js';
import { createToolMachine } from '../../../../renderer/tools/toolMachine.js';
import { pointer } from './fakePort.js';

/** A tool that writes down what is asked of it. */
function recorder(canDrag = true) {
  const said: string[] = [];
  const tool: Tool = {
    id: 'probe',
    click: () => said.push('click'),
    drag: () => {
      if (!canDrag) return undefined;
      said.push('drag');
      return {
        move: ({ point, shift }) => said.push(`move ${point.x}${shift ? ' shift' : ''}`),
        complete: ({ point }) => said.push(`complete ${point.x}`),
        cancel: () => said.push('cancel'),
      };
    },
  };
  return { said, machine: createToolMachine({} as ToolPort, () => tool) };
}

describe('The machine of the pointer tools', () => {
  it('goes from idle to pointing when the pointer goes down', () => {
    const { machine } = recorder();
    expect(machine.path()).toBe('idle');
    machine.down(pointer(10, 10));
    expect(machine.path()).toBe('probe.pointing');
  });

  it('takes a move of one pixel for no drag, and its release for a click', () => {
    const { machine, said } = recorder();
    machine.down(pointer(10, 10));
    machine.move(pointer(11, 10));
    expect(machine.path()).toBe('probe.pointing');
    machine.up(pointer(11, 10));
    expect(machine.path()).toBe('idle');
    expect(said).toEqual(['click']);
  });

  it('drags from three pixels on, and completes at the release', () => {
    const { machine, said } = recorder();
    machine.down(pointer(10, 10));
    machine.move(pointer(13, 10));
    expect(machine.path()).toBe('probe.dragging');
    machine.move(pointer(20, 10));
    machine.up(pointer(21, 10));
    expect(machine.path()).toBe('idle');
    expect(said).toEqual(['drag', 'move 13', 'move 20', 'complete 21']);
  });

  it('cancels a drag on Esc, and says whether there was anything to cancel', () => {
    const { machine, said } = recorder();
    expect(machine.cancel()).toBe(false);
    machine.down(pointer(10, 10));
    machine.move(pointer(30, 10));
    expect(machine.cancel()).toBe(true);
    machine.up(pointer(40, 10));
    expect(machine.path()).toBe('idle');
    expect(said).toEqual(['drag', 'move 30', 'cancel']);
  });

  it('gives a click up on Esc', () => {
    const { machine, said } = recorder();
    machine.down(pointer(10, 10));
    expect(machine.cancel()).toBe(true);
    machine.up(pointer(10, 10));
    expect(said).toEqual([]);
  });

  it('cancels when the pointer is lost', () => {
    const { machine, said } = recorder();
    machine.down(pointer(10, 10));
    machine.move(pointer(30, 10));
    machine.interrupt();
    expect(machine.path()).toBe('idle');
    expect(said).toEqual(['drag', 'move 30', 'cancel']);
  });

  it('moves again where it is when Shift goes down in the middle of a drag', () => {
    const { machine, said } = recorder();
    machine.down(pointer(10, 10));
    machine.move(pointer(30, 10));
    machine.modifiers({ shift: true, alt: false });
    expect(said).toEqual(['drag', 'move 30', 'move 30 shift']);
  });

  it('is idle again when nothing can be dragged there', () => {
    const { machine, said } = recorder(false);
    machine.down(pointer(10, 10));
    machine.move(pointer(30, 10));
    expect(machine.path()).toBe('idle');
    expect(said).toEqual([]);
  });

  it('cancels a drag whose release never came when the pointer goes down anew', () => {
    const { machine, said } = recorder();
    machine.down(pointer(10, 10));
    machine.move(pointer(30, 10));
    machine.down(pointer(50, 50));
    expect(machine.path()).toBe('probe.pointing');
    expect(said).toEqual(['drag', 'move 30', 'cancel']);
  });
});
