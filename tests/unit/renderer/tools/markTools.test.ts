import { describe, expect, it } from 'vitest';
import type { AppState } from '../../../../renderer/state/appState.js';
import { undo } from '../../../../renderer/state/history.js';
import { sampleState } from '../sample.js';
import { pointer, toolsOn } from './fakePort.js';

// The plate is 400 px wide at 20 px to the mm about (0, −10): the place (200, 200) is (0, −10, 2) mm.
const withTool = (tool: AppState['tool'], change: Partial<AppState> = {}): AppState => ({
  ...sampleState(),
  tool,
  ...change,
});

const shapesOf = (state: AppState) => state.note?.regions.map(({ shape }) => shape);

describe('The ellipse tool', () => {
  it('draws from corner to corner, shows it while it is drawn, and puts it into the note at the release', () => {
    const { machine, store } = toolsOn(withTool('ellipse'));
    machine.down(pointer(200, 200));
    machine.move(pointer(280, 240));
    expect(machine.path()).toBe('ellipse.dragging');
    expect(store.now().note?.regions).toEqual([]);
    expect(store.now().draft?.shape).toEqual({
      kind: 'ellipse',
      centreMm: [2, -9, 2],
      u: [1, 0, 0],
      v: [0, 1, 0],
      radiiMm: [2, 1],
    });
    machine.up(pointer(280, 240));
    expect(store.now().draft).toBeUndefined();
    expect(store.now().note?.regions.map(({ id, label }) => [id, label])).toEqual([
      ['L1', 'Lumen 1'],
    ]);
    expect(store.now().selected).toBe('L1');
  });

  it('keeps it round with Shift, and draws from the middle with Alt', () => {
    const { machine, store } = toolsOn(withTool('ellipse'));
    machine.down(pointer(200, 200));
    machine.move(pointer(280, 240, { shift: true, alt: true }));
    machine.up(pointer(280, 240, { shift: true, alt: true }));
    expect(shapesOf(store.now())).toEqual([
      { kind: 'ellipse', centreMm: [0, -10, 2], u: [1, 0, 0], v: [0, 1, 0], radiiMm: [4, 4] },
    ]);
  });

  it('leaves nothing on Esc', () => {
    const { machine, store } = toolsOn(withTool('ellipse'));
    machine.down(pointer(200, 200));
    machine.move(pointer(280, 240));
    machine.cancel();
    expect(store.now().draft).toBeUndefined();
    expect(store.now().note?.regions).toEqual([]);
    expect(store.now().history.undo).toEqual([]);
  });

  it('takes a click for no ellipse: it sets the crosshair', () => {
    const { machine, store } = toolsOn(withTool('ellipse'));
    machine.down(pointer(220, 200));
    machine.up(pointer(221, 200));
    expect(store.now().note?.regions).toEqual([]);
    expect(store.now().caret).toEqual({ kernel: 'soft', pointMm: [1, -10, 2] });
  });

  it('draws nothing on a sharp plate whose positions can’t be compared, and says so', () => {
    const { machine, store } = toolsOn({ ...sampleState({ link: 'index' }), tool: 'ellipse' });
    machine.down(pointer(200, 200, { kernel: 'sharp' }));
    machine.move(pointer(280, 240, { kernel: 'sharp' }));
    expect(machine.path()).toBe('idle');
    expect(store.now().message?.text).toContain('drawn on the soft plate');
  });

  it('draws nothing where the plate has no slice', () => {
    const { machine, store } = toolsOn({ ...sampleState({ z: 99 }), tool: 'ellipse' });
    machine.down(pointer(200, 200));
    machine.move(pointer(280, 240));
    machine.up(pointer(280, 240));
    expect(store.now().note?.regions).toEqual([]);
  });
});

describe('The outline tool', () => {
  it('sets points by clicks and closes at a click on the first one', () => {
    const { machine, store } = toolsOn(withTool('outline', { role: 'plaque' }));
    for (const [x, y] of [
      [200, 200],
      [240, 200],
      [220, 240],
    ] as const) {
      machine.down(pointer(x, y));
      machine.up(pointer(x, y));
    }
    expect(store.now().openOutline?.pointsMm).toHaveLength(3);
    machine.down(pointer(203, 202));
    machine.up(pointer(203, 202));
    expect(store.now().openOutline).toBeUndefined();
    expect(shapesOf(store.now())).toEqual([
      {
        kind: 'outline',
        pointsMm: [
          [0, -10, 2],
          [2, -10, 2],
          [1, -8, 2],
        ],
      },
    ]);
    expect(store.now().selected).toBe('P1');
  });

  it('traces a drag and closes it at the release, without the points on straight lines', () => {
    const { machine, store } = toolsOn(withTool('outline'));
    machine.down(pointer(200, 200));
    for (const [x, y] of [
      [210, 200],
      [220, 200],
      [240, 200],
      [240, 220],
      [240, 240],
    ] as const) {
      machine.move(pointer(x, y));
    }
    machine.up(pointer(240, 240));
    expect(shapesOf(store.now())).toEqual([
      {
        kind: 'outline',
        pointsMm: [
          [0, -10, 2],
          [2, -10, 2],
          [2, -8, 2],
        ],
      },
    ]);
  });

  it('makes no region of a traced straight line', () => {
    const { machine, store } = toolsOn(withTool('outline'));
    machine.down(pointer(200, 200));
    machine.move(pointer(220, 200));
    machine.move(pointer(240, 200));
    machine.up(pointer(240, 200));
    expect(store.now().note?.regions).toEqual([]);
    expect(store.now().draft).toBeUndefined();
  });
});

describe('Taking hold of a region', () => {
  const marked = (tool: AppState['tool']): AppState => {
    const { machine, store } = toolsOn(withTool('ellipse'));
    machine.down(pointer(160, 160));
    machine.move(pointer(240, 240));
    machine.up(pointer(240, 240));
    return { ...store.now(), tool };
  };

  it('moves the selected region by its inside, whatever the tool, and undo puts it back', () => {
    const { machine, store } = toolsOn(marked('window'));
    machine.down(pointer(200, 200));
    machine.move(pointer(220, 200));
    expect(machine.path()).toBe('select.dragging');
    machine.up(pointer(220, 200));
    expect(shapesOf(store.now())).toMatchObject([{ centreMm: [1, -10, 2], radiiMm: [2, 2] }]);
    store.change('Undo', undo);
    expect(shapesOf(store.now())).toMatchObject([{ centreMm: [0, -10, 2] }]);
  });

  it('changes one half axis by its handle, and both with Shift', () => {
    const { machine, store } = toolsOn(marked('window'));
    machine.down(pointer(240, 200));
    machine.move(pointer(260, 200));
    machine.up(pointer(260, 200));
    expect(shapesOf(store.now())).toMatchObject([{ centreMm: [0, -10, 2], radiiMm: [3, 2] }]);
    machine.down(pointer(200, 240));
    machine.move(pointer(200, 280, { shift: true }));
    machine.up(pointer(200, 280, { shift: true }));
    expect(shapesOf(store.now())).toMatchObject([{ radiiMm: [4, 4] }]);
  });

  it('leaves the region as it was on Esc', () => {
    const { machine, store } = toolsOn(marked('move'));
    const before = store.now().note;
    machine.down(pointer(200, 200));
    machine.move(pointer(260, 200));
    expect(store.now().draft?.regionId).toBe('L1');
    machine.cancel();
    expect(store.now().note).toBe(before);
    expect(store.now().draft).toBeUndefined();
  });

  it('leaves the inside of a region that is not selected to the tool', () => {
    const { machine } = toolsOn({ ...marked('window'), selected: undefined });
    machine.down(pointer(200, 200));
    expect(machine.path()).toBe('window.pointing');
  });

  it('selects a region by a click on its edge', () => {
    const { machine, store } = toolsOn({ ...marked('window'), selected: undefined });
    machine.down(pointer(240, 202));
    expect(machine.path()).toBe('select.pointing');
    machine.up(pointer(240, 202));
    expect(store.now().selected).toBe('L1');
  });

  it('does not reach regions of other slices', () => {
    const state = marked('window');
    const elsewhere = {
      ...state,
      plates: { ...state.plates, soft: { ...state.plates.soft, alongMm: 3 } },
    };
    const { machine } = toolsOn(elsewhere);
    machine.down(pointer(240, 202));
    expect(machine.path()).toBe('window.pointing');
  });
});
