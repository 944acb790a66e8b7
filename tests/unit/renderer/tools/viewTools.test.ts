import { describe, expect, it } from 'vitest';
import { plateToPatient } from '../../../../renderer/plates/plateTransform.js';
import type { AppState } from '../../../../renderer/state/appState.js';
import { transformOf } from '../../../../renderer/state/selectors.js';
import { draggedWindow } from '../../../../renderer/tools/windowTool.js';
import { zoomBy } from '../../../../renderer/tools/zoomTool.js';
import { sampleState } from '../sample.js';
import { pointer, toolsOn } from './fakePort.js';

const withTool = (tool: AppState['tool'], links = true): AppState => ({
  ...sampleState(),
  tool,
  links: { scroll: true, window: links, view: links },
});

describe('The window tool', () => {
  it('widens to the right by the width in 400 pixels, and brightens upwards', () => {
    const window = { centre: 300, width: 800, function: 'LINEAR' } as const;
    expect(draggedWindow(window, 100, 0)).toEqual({ centre: 300, width: 1000, function: 'LINEAR' });
    expect(draggedWindow(window, 0, -50)).toEqual({ centre: 200, width: 800, function: 'LINEAR' });
  });

  it('never makes a window narrower than 1', () => {
    const window = { centre: 40, width: 10, function: 'LINEAR' } as const;
    expect(draggedWindow(window, -5000, 0).width).toBe(1);
  });

  it('sets both windows when they are linked, and puts both back on Esc', () => {
    const { machine, store } = toolsOn(withTool('window'));
    const before = store.now().plates;
    machine.down(pointer(100, 100));
    machine.move(pointer(200, 100));
    expect(machine.path()).toBe('window.dragging');
    expect(store.now().plates.soft.window).toEqual({
      centre: 300,
      width: 1500,
      function: 'LINEAR',
    });
    expect(store.now().plates.sharp.window).toEqual(store.now().plates.soft.window);
    machine.cancel();
    expect(store.now().plates).toEqual(before);
  });

  it('sets one window only when they are not linked', () => {
    const { machine, store } = toolsOn(withTool('window', false));
    machine.down(pointer(100, 100));
    machine.move(pointer(200, 100));
    expect(store.now().plates.sharp.window).toEqual({
      centre: 300,
      width: 1200,
      function: 'LINEAR',
    });
  });
});

describe('The move tool', () => {
  it('moves the image with the pointer, both plates by the same mm', () => {
    const { machine, store } = toolsOn(withTool('move'));
    machine.down(pointer(200, 200));
    machine.move(pointer(240, 180));
    machine.up(pointer(240, 180));
    // 40 px right and 20 px up at 20 px to the mm: the middle goes 2 mm left and 1 mm down.
    expect(store.now().plates.soft.centreMm).toEqual([-2, -9, 2]);
    expect(store.now().plates.sharp.centreMm).toEqual([-2, -9, 2]);
  });

  it('puts the image back on Esc', () => {
    const { machine, store } = toolsOn(withTool('move'));
    const before = store.now().plates;
    machine.down(pointer(200, 200));
    machine.move(pointer(300, 300));
    machine.cancel();
    expect(store.now().plates).toEqual(before);
  });
});

describe('The zoom tool', () => {
  it('leaves the place under the pointer where it is', () => {
    const state = sampleState();
    const before = transformOf(state, 'soft');
    const after = transformOf(zoomBy('soft', 2, { x: 300, y: 150 })(state), 'soft');
    if (before === undefined || after === undefined) throw new Error('invalid sample');
    expect(after.pxPerColumn).toBe(2 * before.pxPerColumn);
    const [x, y] = plateToPatient(before, { x: 300, y: 150 });
    const [x2, y2] = plateToPatient(after, { x: 300, y: 150 });
    expect(x2).toBeCloseTo(x, 9);
    expect(y2).toBeCloseTo(y, 9);
  });

  it('enlarges upwards e times in 160 pixels, from the scale that it began with', () => {
    const { machine, store } = toolsOn(withTool('zoom'));
    machine.down(pointer(200, 200));
    machine.move(pointer(200, 100));
    machine.move(pointer(200, 40));
    expect(store.now().plates.soft.scalePxPerMm).toBeCloseTo(20 * Math.E, 9);
    machine.cancel();
    expect(store.now().plates.soft.scalePxPerMm).toBe(20);
  });
});
