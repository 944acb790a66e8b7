import { describe, expect, it } from 'vitest';
import type { AppState } from '../../../../renderer/state/appState.js';
import { goToRegion } from '../../../../renderer/state/changes/goToRegion.js';
import { removeSelected } from '../../../../renderer/state/changes/regions.js';
import { redo, undo } from '../../../../renderer/state/history.js';
import { linesOn } from '../../../../renderer/state/lineSelectors.js';
import { giveUp, plateKey } from '../../../../renderer/tools/plateKeys.js';
import { sampleState } from '../sample.js';
import { EMPTY_BENCH, NOW, pointer, toolsOn } from './fakePort.js';

// The plate is 400 px wide at 20 px to the mm about (0, −10): the place (200, 200) is (0, −10, 2) mm.
const withTool = (tool: AppState['tool']): AppState => ({ ...sampleState(), tool });

const drawn = () => {
  const tools = toolsOn(withTool('edge'));
  tools.machine.down(pointer(100, 200));
  tools.machine.move(pointer(150, 210));
  tools.machine.move(pointer(300, 220));
  tools.machine.up(pointer(300, 220));
  return tools;
};

const first = (state: AppState) => state.note?.edges[0];

describe('The line tool', () => {
  it('draws from press to release, shows the line while it is drawn, and puts it into the note', () => {
    const { machine, store } = toolsOn(withTool('edge'));
    machine.down(pointer(100, 200));
    machine.move(pointer(300, 220));
    expect(machine.path()).toBe('edge.dragging');
    expect(store.now().lineDraft).toEqual({
      kernel: 'soft',
      purpose: 'edge',
      lineId: undefined,
      fromMm: [-5, -10, 2],
      toMm: [5, -9, 2],
      bandMm: 4,
    });
    expect(store.now().note?.edges).toEqual([]);
    machine.up(pointer(300, 220));
    expect(first(store.now())).toMatchObject({
      id: 'E1',
      label: 'Edge 1',
      fromMm: [-5, -10, 2],
      toMm: [5, -9, 2],
    });
    expect(store.now()).toMatchObject({ selected: 'E1', lineDraft: undefined, plot: 'noise' });
    expect(linesOn(store.now(), 'sharp').map(({ id }) => id)).toEqual(['E1']);
  });

  it('keeps one of eight directions with Shift', () => {
    const { machine, store } = toolsOn(withTool('edge'));
    machine.down(pointer(100, 200));
    machine.move(pointer(300, 220, { shift: true }));
    machine.up(pointer(300, 220, { shift: true }));
    expect(first(store.now())?.toMm[1]).toBeCloseTo(-10, 9);
  });

  it('leaves all as it was at Esc, and tells of a line that is too short to be meant', () => {
    const { machine, store } = toolsOn(withTool('edge'));
    machine.down(pointer(100, 200));
    machine.move(pointer(300, 220));
    machine.cancel();
    expect(store.now()).toMatchObject({ lineDraft: undefined, selected: undefined });
    machine.down(pointer(100, 200));
    machine.move(pointer(120, 200));
    machine.up(pointer(120, 200));
    expect(store.now().note?.edges).toEqual([]);
    expect(store.now().message?.text).toContain('shorter than 2 mm');
  });

  it('moves an end by its handle and the whole line by its body, each undone as one', () => {
    const { machine, store } = drawn();
    machine.down(pointer(300, 220));
    expect(machine.path()).toBe('line-handle.pointing');
    machine.move(pointer(320, 220));
    machine.up(pointer(320, 220));
    expect(first(store.now())).toMatchObject({ fromMm: [-5, -10, 2], toMm: [6, -9, 2] });
    machine.down(pointer(210, 210));
    machine.move(pointer(210, 250));
    machine.up(pointer(210, 250));
    expect(first(store.now())).toMatchObject({ fromMm: [-5, -8, 2], toMm: [6, -7, 2] });
    store.change('Undo', undo);
    store.change('Undo', undo);
    expect(first(store.now())?.toMm).toEqual([5, -9, 2]);
    store.change('Redo', redo);
    expect(first(store.now())?.toMm).toEqual([6, -9, 2]);
  });

  it('takes no hold of the edge of a region, over which lines are drawn', () => {
    const tools = toolsOn(withTool('ellipse'));
    tools.machine.down(pointer(180, 180));
    tools.machine.move(pointer(220, 220));
    tools.machine.up(pointer(220, 220));
    tools.store.change('Edge line', (state) => ({ ...state, tool: 'edge', selected: undefined }));
    tools.machine.down(pointer(180, 200));
    expect(tools.machine.path()).toBe('edge.pointing');
  });

  it('draws nothing in a verified note, and says why', () => {
    const { note } = sampleState();
    const { machine, store } = toolsOn({
      ...withTool('edge'),
      note: note && { ...note, verification: 'VERIFIED' },
    });
    machine.down(pointer(100, 200));
    machine.move(pointer(300, 220));
    expect(store.now().lineDraft).toBeUndefined();
    expect(store.now().message?.text).toContain('verified');
  });
});

describe('Lines by key', () => {
  const press = (tools: ReturnType<typeof toolsOn>, ...keys: readonly string[]) => {
    for (const key of keys)
      plateKey(tools.port, 'soft', {
        key: key.replace('Shift+', ''),
        shift: key.startsWith('Shift+'),
        letterKeys: true,
      });
  };

  it('Enter begins one at the crosshair, the arrows move its end, Enter places it', () => {
    const tools = toolsOn(withTool('edge'));
    press(tools, 'Shift+ArrowLeft', 'Enter', 'Shift+ArrowRight', 'Shift+ArrowRight', '+', 'Enter');
    // A pixel is 0.5 mm, Shift moves ten of them.
    expect(first(tools.store.now())).toMatchObject({
      fromMm: [-5, -10, 2],
      toMm: [5, -10, 2],
      bandMm: 4.5,
    });
  });

  it('a second Enter at the same place sets nothing, Backspace and Esc give the line up', () => {
    const tools = toolsOn(withTool('edge'));
    press(tools, 'Enter', 'Enter');
    expect(tools.store.now().lineDraft).toBeDefined();
    press(tools, 'Backspace');
    expect(tools.store.now().lineDraft).toBeUndefined();
    press(tools, 'Enter');
    expect(giveUp(tools.port)).toBe(true);
    expect(tools.store.now()).toMatchObject({ lineDraft: undefined });
    expect(tools.store.now().note?.edges).toEqual([]);
  });

  it('the arrows move the selected line; Enter takes its start, its end, and all of it again', () => {
    const tools = drawn();
    press(tools, 'ArrowDown', 'ArrowDown');
    expect(first(tools.store.now())).toMatchObject({ fromMm: [-5, -9, 2], toMm: [5, -8, 2] });
    press(tools, 'Enter', 'ArrowLeft');
    expect(first(tools.store.now())).toMatchObject({ fromMm: [-5.5, -9, 2], toMm: [5, -8, 2] });
    press(tools, 'Enter', 'ArrowRight');
    expect(first(tools.store.now())).toMatchObject({ fromMm: [-5.5, -9, 2], toMm: [5.5, -8, 2] });
    press(tools, 'Enter');
    expect(tools.store.now().lineEnd).toBeUndefined();
    // Two moves down are one step back, each end another.
    for (let step = 0; step < 3; step += 1) tools.store.change('Undo', undo);
    expect(first(tools.store.now())).toMatchObject({ fromMm: [-5, -10, 2], toMm: [5, -9, 2] });
  });

  it('the band stays between 1 and 12 mm', () => {
    const tools = drawn();
    press(tools, ...Array.from({ length: 30 }, () => '+'));
    expect(first(tools.store.now())?.bandMm).toBe(12);
    press(tools, ...Array.from({ length: 40 }, () => '-'));
    expect(first(tools.store.now())?.bandMm).toBe(1);
  });

  it('the selected line is deleted and brought back, and gone to from another slice', () => {
    const tools = drawn();
    const away: AppState = {
      ...tools.store.now(),
      plates: {
        soft: { ...tools.store.now().plates.soft, alongMm: 0 },
        sharp: { ...tools.store.now().plates.sharp, alongMm: 0 },
      },
    };
    expect(goToRegion(EMPTY_BENCH.cuts)(away).plates.soft.alongMm).toBe(2);
    tools.store.change('Delete', removeSelected(NOW));
    expect(tools.store.now().note?.edges).toEqual([]);
    expect(tools.store.now()).toMatchObject({ selected: undefined });
    expect(tools.store.now().message?.text).toBe('Edge 1 deleted. Undo brings it back.');
    tools.store.change('Undo', undo);
    expect(first(tools.store.now())?.id).toBe('E1');
  });
});
