import { describe, expect, it } from 'vitest';
import type { AppState } from '../../../../renderer/state/appState.js';
import { giveUp, plateKey } from '../../../../renderer/tools/plateKeys.js';
import { sampleState } from '../sample.js';
import { toolsOn } from './fakePort.js';

function keysOn(tool: AppState['tool']) {
  const { port, store } = toolsOn({ ...sampleState(), tool });
  const press = (key: string, shift = false): boolean =>
    plateKey(port, 'soft', { key, shift, letterKeys: true });
  return { press, port, store };
}

describe('The keys of a plate', () => {
  it('move the crosshair by a pixel, with Shift by ten', () => {
    const { press, store } = keysOn('window');
    press('ArrowRight');
    press('ArrowDown', true);
    expect(store.now().caret).toEqual({ kernel: 'soft', pointMm: [0.5, -5, 0] });
  });

  it('place an ellipse at the crosshair with Enter, move and enlarge it, and accept it with Enter', () => {
    const { press, store } = keysOn('ellipse');
    press('Enter');
    expect(store.now().draft?.shape).toMatchObject({ centreMm: [0, -10, 2], radiiMm: [1.5, 1.5] });
    press('ArrowLeft');
    press('+');
    press('Enter');
    expect(store.now().draft).toBeUndefined();
    expect(store.now().note?.regions.map(({ shape }) => shape)).toMatchObject([
      { centreMm: [-0.5, -10, 2], radiiMm: [2, 2] },
    ]);
  });

  it('move the selected region, and a row of moves is undone as one', () => {
    const { press, store } = keysOn('ellipse');
    press('Enter');
    press('Enter');
    press('ArrowRight');
    press('ArrowRight');
    press('ArrowDown', true);
    expect(store.now().note?.regions[0]?.shape).toMatchObject({ centreMm: [1, -5, 2] });
    expect(store.now().history.undo).toHaveLength(2);
  });

  it('set the points of an outline with Enter, take one back, and close it with Enter twice', () => {
    const { press, store } = keysOn('outline');
    press('Enter');
    press('ArrowRight', true);
    press('Enter');
    press('ArrowDown', true);
    press('Enter');
    press('ArrowLeft');
    press('Enter');
    press('Backspace');
    expect(store.now().openOutline?.pointsMm).toHaveLength(3);
    press('ArrowRight');
    press('Enter');
    expect(store.now().note?.regions[0]?.shape).toEqual({
      kind: 'outline',
      pointsMm: [
        [0, -10, 2],
        [5, -10, 2],
        [5, -5, 2],
      ],
    });
  });

  it('say what is missing when an outline of two points is closed', () => {
    const { press, store } = keysOn('outline');
    press('Enter');
    press('ArrowRight');
    press('Enter');
    press('Enter');
    expect(store.now().message?.text).toBe('An outline needs three points. Set another one.');
  });

  it('go to the ends of the stack with Home and End', () => {
    const { press, store } = keysOn('window');
    press('End');
    expect(store.now().plates.sharp.alongMm).toBe(4);
    press('Home');
    expect(store.now().plates.soft.alongMm).toBe(0);
  });

  it('leave plus and minus alone when single keys are switched off', () => {
    const { port } = keysOn('ellipse');
    expect(plateKey(port, 'soft', { key: '+', shift: false, letterKeys: false })).toBe(false);
  });

  it('give up one thing at a time: the shape being placed, then selection and crosshair', () => {
    const { press, port, store } = keysOn('ellipse');
    press('ArrowRight');
    press('Enter');
    expect(giveUp(port)).toBe(true);
    expect(store.now().draft).toBeUndefined();
    expect(store.now().caret).toBeDefined();
    expect(giveUp(port)).toBe(true);
    expect(store.now().caret).toBeUndefined();
    expect(giveUp(port)).toBe(false);
  });
});
