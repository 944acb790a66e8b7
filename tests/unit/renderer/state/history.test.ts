import { describe, expect, it } from 'vitest';
import type { Note, RegionValues } from '../../../../core/note/index.js';
import { FLAGS, notMeasured } from '../../../../core/region/index.js';
import {
  placeRegion,
  removeSelected,
  reshapeRegion,
  stepSelection,
} from '../../../../renderer/state/changes/regions.js';
import { remeasured } from '../../../../renderer/state/changes/remeasure.js';
import { editNote, redo, undo } from '../../../../renderer/state/history.js';
import { createStore } from '../../../../renderer/state/store.js';
import { sampleState } from '../sample.js';

const NOW = '2026-01-10T10:42:00Z';
const NONE: RegionValues = { soft: null, sharp: null };
const circle = (x: number) =>
  ({ kind: 'ellipse', centreMm: [x, -10, 2], radiiMm: [1, 1] }) as const;
const comment = (text: string) => editNote('Comment', (note: Note) => ({ ...note, comment: text }));

describe('Undo and redo', () => {
  it('put back the note before a change, and make the change again', () => {
    const store = createStore(sampleState());
    store.change('Comment', comment('one'));
    store.change('Comment', comment('two'));
    store.change('Undo', undo);
    expect(store.now().note?.comment).toBe('one');
    store.change('Undo', undo);
    expect(store.now().note?.comment).toBe('');
    store.change('Redo', redo);
    store.change('Redo', redo);
    expect(store.now().note?.comment).toBe('two');
  });

  it('do nothing when there is nothing to undo or redo', () => {
    const state = sampleState();
    expect(undo(state)).toBe(state);
    expect(redo(state)).toBe(state);
  });

  it('forget what was undone when another change is made', () => {
    const changed = comment('three')(undo(comment('two')(sampleState())));
    expect(redo(changed)).toBe(changed);
  });

  it('take changes of one key in a row as one, and others apart', () => {
    const placed = placeRegion('lumen', circle(0), NONE, NOW)(sampleState());
    const moved = [1, 2, 3].reduce(
      (state, x) => reshapeRegion('L1', circle(x), NONE, NOW, 'move:L1')(state),
      placed,
    );
    expect(moved.history.undo.map(({ label }) => label)).toEqual([
      'Mark Lumen 1',
      'Change Lumen 1',
    ]);
    expect(undo(moved).note?.regions[0]?.shape).toEqual(circle(0));
  });

  it('select nothing when the selected region is undone away', () => {
    const placed = placeRegion('lumen', circle(0), NONE, NOW)(sampleState());
    expect(placed.selected).toBe('L1');
    expect(undo(placed).selected).toBeUndefined();
  });

  it('change nothing of a verified note, and say so', () => {
    const state = sampleState();
    const verified = {
      ...state,
      note: state.note && { ...state.note, verification: 'VERIFIED' as const },
    };
    const after = comment('one')(verified);
    expect(after.note).toBe(verified.note);
    expect(after.message?.text).toBe('This note is verified. To change it, amend it (Note menu).');
  });
});

describe('Regions', () => {
  it('are stepped through in the order of making, round and round', () => {
    const state = [0, 1, 2].reduce(
      (so, x) => placeRegion('wall', circle(x), NONE, NOW)(so),
      sampleState(),
    );
    expect(state.selected).toBe('W3');
    expect(stepSelection(1)(state).selected).toBe('W1');
    expect(stepSelection(-1)(state).selected).toBe('W2');
    expect(stepSelection(-1)({ ...state, selected: undefined }).selected).toBe('W3');
  });

  it('are deleted with a word on how to have them back, and their names are not used again', () => {
    const placed = placeRegion('wall', circle(0), NONE, NOW)(sampleState());
    const removed = removeSelected(NOW)(placed);
    expect(removed.note?.regions).toEqual([]);
    expect(removed.message?.text).toBe('Wall 1 deleted. Undo brings it back.');
    expect(placeRegion('wall', circle(0), NONE, NOW)(removed).selected).toBe('W2');
  });
});

describe('Measuring a note again', () => {
  const value = (meanHu: number | null) => ({
    ...notMeasured(circle(0), FLAGS.positionsNotComparable),
    meanHu,
  });
  const noteWith = (values: RegionValues): Note => {
    const { note } = placeRegion('lumen', circle(0), values, NOW)(sampleState());
    if (note === undefined) throw new Error('invalid sample');
    return note;
  };

  it('gives back the same note when every value holds', () => {
    const note = noteWith({ soft: value(100), sharp: value(90) });
    expect(remeasured(note, () => ({ soft: value(100), sharp: value(90) }), NOW).note).toBe(note);
  });

  it('keeps a saved value while its slice is still to come', () => {
    const note = noteWith({ soft: value(100), sharp: value(90) });
    expect(remeasured(note, () => NONE, NOW).note).toBe(note);
  });

  it('fills in what could not be measured before, and calls that no change', () => {
    const result = remeasured(noteWith(NONE), () => ({ soft: value(100), sharp: null }), NOW);
    expect(result.note.regions[0]?.soft?.meanHu).toBe(100);
    expect(result.changed).toEqual([]);
  });

  it('takes the new value and names each one that no longer holds', () => {
    const note = noteWith({ soft: value(100), sharp: value(90) });
    const result = remeasured(note, () => ({ soft: value(101), sharp: value(null) }), NOW);
    expect(result.note.regions[0]?.soft?.meanHu).toBe(101);
    expect(result.changed).toEqual([
      { label: 'Lumen 1', kernel: 'soft', beforeHu: 100, nowHu: 101 },
      { label: 'Lumen 1', kernel: 'sharp', beforeHu: 90, nowHu: null },
    ]);
  });
});
