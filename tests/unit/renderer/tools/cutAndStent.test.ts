import { describe, expect, it } from 'vitest';
import type { AppState } from '../../../../renderer/state/appState.js';
import {
  deletePlane,
  leavePlane,
  placePlane,
  scrollOrShift,
  showPlane,
} from '../../../../renderer/state/changes/cut.js';
import { goToRegion } from '../../../../renderer/state/changes/goToRegion.js';
import { removeSelected } from '../../../../renderer/state/changes/regions.js';
import { undo } from '../../../../renderer/state/history.js';
import { regionsOn } from '../../../../renderer/state/regionSelectors.js';
import { shownSlice, stackOf } from '../../../../renderer/state/selectors.js';
import { giveUp, plateKey } from '../../../../renderer/tools/plateKeys.js';
import { createCuts } from '../../../../renderer/volumes/cuts.js';
import { createVolume, type Volume } from '../../../../renderer/volumes/volume.js';
import { axial, sampleStack, sampleState } from '../sample.js';
import { EMPTY_BENCH, NOW, pointer, toolsOn } from './fakePort.js';

const soft = sampleStack({ positionsMm: axial(9, 0.5) });
const sharp = sampleStack({ series: '2.25.88001.3', positionsMm: axial(9, 0.5) });

/** A volume with values that rise along x by 10 HU a mm, so that cuts of it are known. */
function filled(stack: typeof soft): Volume {
  const made = createVolume(stack, { isolated: false });
  if (!made.ok) throw new Error(made.refusal.text);
  stack.slices.forEach((_, index) => {
    const values = Int16Array.from({ length: 1600 }, (_value, pixel) => 5 * (pixel % 40));
    made.value.receive(index, values.buffer);
  });
  return made.value;
}

const volumes = { soft: filled(soft), sharp: filled(sharp) };
const cuts = createCuts(() => volumes);
const COURSE = [
  [0, -10, 1],
  [0.5, -10, 3],
] as const;

/** The sample state on these stacks. */
function onStacks(): AppState {
  const state = sampleState();
  if (state.pair === undefined) throw new Error('invalid sample: no pair');
  return { ...state, pair: { ...state.pair, soft, sharp } };
}

const withCut = (): AppState => placePlane({ courseMm: COURSE }, cuts, NOW)(onStacks());

describe('An oblique cut', () => {
  it('is put into the note and shown on both plates, with what is known of it', () => {
    const state = withCut();
    expect(state.note?.planes).toMatchObject([
      { id: 'O1', label: 'Cut 1', courseMm: COURSE, resampling: 'cubic convolution' },
    ]);
    // atan(0.5 / 2)
    expect(state.note?.planes[0]?.angleDeg).toBeCloseTo(14.036, 3);
    expect(state.cut?.planeId).toBe('O1');
    expect(stackOf(state, 'soft')).toBe(state.cut?.soft);
    expect(shownSlice(state, 'sharp')?.slice.image.sopInstanceUid).toBe('');
    expect(state.plates.soft.centreMm).toEqual([0.25, -10, 2]);
  });

  it('is left for the slices where they were, and gone to again with what lies on it', () => {
    const start = onStacks();
    const marked = {
      ...withCut(),
      note: {
        ...(withCut().note as NonNullable<AppState['note']>),
        regions: [],
      },
    };
    const left = leavePlane(marked);
    expect(left.cut).toBeUndefined();
    expect(left.plates.soft.alongMm).toBe(start.plates.soft.alongMm);
    expect(showPlane('O1', cuts)(left).cut?.planeId).toBe('O1');
  });

  it('holds only its own regions, and the slices none of them', () => {
    const tools = toolsOn({ ...withCut(), tool: 'ellipse' });
    tools.machine.down(pointer(180, 180));
    tools.machine.move(pointer(200, 200));
    tools.machine.move(pointer(220, 220));
    tools.machine.up(pointer(220, 220));
    const placed = tools.store.now();
    const region = placed.note?.regions.at(-1);
    expect(region?.plane).toBe('O1');
    expect(regionsOn(placed, 'soft').map(({ id }) => id)).toEqual([region?.id]);
    const left = leavePlane(placed);
    expect(left.selected).toBeUndefined();
    expect(regionsOn(left, 'soft').some(({ id }) => id === region?.id)).toBe(false);
    const back = goToRegion(cuts)({ ...left, selected: region?.id });
    expect(back.cut?.planeId).toBe('O1');
    // What is measured on a plane holds it.
    const shifted = scrollOrShift('soft', 1, cuts, NOW)(back);
    expect(shifted.message?.text).toContain('Something is measured on Cut 1');
    expect(shifted.note?.planes).toEqual(back.note?.planes);
    expect(deletePlane('O1', NOW)(back).message?.text).toContain('delete what lies on it first');
  });

  it('moves along the vessel by half a mm while nothing lies on it, and as one step of undo', () => {
    const twice = [1, 1].reduce(
      (so, step) => scrollOrShift('soft', step, cuts, NOW)(so),
      withCut(),
    );
    const [from] = twice.note?.planes[0]?.courseMm ?? [];
    // A mm along (0.5, 0, 2) / 2.0616.
    expect(from?.[0]).toBeCloseTo(0.24254, 4);
    expect(from?.[2]).toBeCloseTo(1.97014, 4);
    expect(undo(twice).note?.planes[0]?.courseMm[0]).toEqual([0, -10, 1]);
  });

  it('goes when its making is undone, and the plates show slices again', () => {
    const state = undo(withCut());
    expect(state.cut).toBeUndefined();
    expect(state.note?.planes).toEqual([]);
    const gone = deletePlane('O1', NOW)(withCut());
    expect(gone.cut).toBeUndefined();
    expect(gone.message?.text).toBe('Cut 1 deleted. Undo brings it back.');
  });

  it('is refused where the points tell no direction', () => {
    const state = placePlane({ courseMm: [COURSE[0], COURSE[0]] }, cuts, NOW)(onStacks());
    expect(state.note?.planes).toEqual([]);
    expect(state.message?.text).toContain('tell no direction');
  });
});

describe('The course of a cut', () => {
  const tools = () => toolsOn({ ...onStacks(), tool: 'cut' });

  it('begins with a click, which Esc gives up', () => {
    const { machine, store, port } = tools();
    machine.down(pointer(200, 200));
    machine.up(pointer(200, 200));
    expect(store.now().courseStart?.kernel).toBe('soft');
    expect(giveUp(port)).toBe(true);
    expect(store.now().courseStart).toBeUndefined();
  });

  it('begins by keyboard at the crosshair', () => {
    const { store, port } = tools();
    plateKey(port, 'soft', { key: 'Enter', shift: false, letterKeys: true });
    expect(store.now().courseStart).toBeDefined();
    expect(store.now().message?.text).toContain('Scroll along the vessel');
  });
});

describe('A stent in the note', () => {
  const placed = () => {
    const tools = toolsOn({ ...onStacks(), tool: 'stent' });
    tools.machine.down(pointer(200, 200));
    tools.machine.up(pointer(200, 200));
    return tools;
  };

  it('is placed by a click, without a fit until one has been computed', () => {
    const state = placed().store.now();
    expect(state.note?.stents).toMatchObject([{ id: 'S1', label: 'Stent 1', fit: null }]);
    expect(state.selected).toBe('S1');
    expect(state.plot).toBe('stent');
  });

  it('is placed and moved by keyboard, deleted and brought back', () => {
    const { store, port } = toolsOn({ ...onStacks(), tool: 'stent' });
    plateKey(port, 'soft', { key: 'Enter', shift: false, letterKeys: true });
    const before = store.now().note?.stents[0]?.centreMm ?? [0, 0, 0];
    plateKey(port, 'soft', { key: 'ArrowRight', shift: false, letterKeys: true });
    const [x] = store.now().note?.stents[0]?.centreMm ?? [];
    expect(x).toBeCloseTo(before[0] + 0.5, 10);
    store.change('Delete', removeSelected(NOW));
    expect(store.now().note?.stents).toEqual([]);
    store.change('Undo', undo);
    expect(store.now().note?.stents).toHaveLength(1);
  });

  it('is taken hold of at its ring and dragged to another place', () => {
    const tools = placed();
    // The ring of a stent without a fit is drawn at 1.5 mm: 30 px.
    tools.machine.down(pointer(230, 200));
    tools.machine.move(pointer(240, 200));
    tools.machine.move(pointer(250, 200));
    tools.machine.up(pointer(250, 200));
    expect(tools.store.now().note?.stents[0]?.centreMm[0]).toBeCloseTo(1, 10);
    expect(EMPTY_BENCH.fitting.fitOf).toBeDefined();
  });
});
