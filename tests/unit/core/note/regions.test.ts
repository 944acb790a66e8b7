import { describe, expect, it } from 'vitest';
import {
  addContrast,
  addRegion,
  changeRegion,
  type Note,
  removeRegion,
  setFinding,
} from '../../../../core/note/index.js';
import type { Role } from '../../../../core/region/index.js';
import type { Result } from '../../../../core/result.js';
import { ellipse, emptyNote, LATER, NOW, pair, values } from './noteFixture.js';

const images = await pair();

function got<T>(result: Result<T>): T {
  if (!result.ok) throw new Error(result.refusal.text);
  return result.value;
}

function withRegions(...roles: readonly Role[]): Note {
  return roles.reduce((note, role, index) => {
    const shape = ellipse(5 + 4 * index, 8);
    return addRegion(note, { role, shape, ...values(images, shape) }, NOW).note;
  }, emptyNote(images));
}

describe('regions of a note', () => {
  it('are named by role and number', () => {
    const note = withRegions('lumen', 'wall', 'lumen', 'reference');
    expect(note.regions.map(({ id, label }) => [id, label])).toEqual([
      ['L1', 'Lumen 1'],
      ['W1', 'Wall 1'],
      ['L2', 'Lumen 2'],
      ['R1', 'Reference 1'],
    ]);
  });

  it('never use a number twice, not even that of the last region after its removal', () => {
    const shape = ellipse(9, 9);
    const removed = removeRegion(withRegions('lumen', 'lumen'), 'L2', NOW).note;
    const { region } = addRegion(removed, { role: 'lumen', shape, soft: null, sharp: null }, NOW);
    expect(region.id).toBe('L3');
  });

  it('go with the contrasts that used them, and these are told', () => {
    const note = withRegions('lumen', 'wall', 'reference', 'lumen');
    const one = got(addContrast(note, { lumen: 'L1', wall: 'W1' }, NOW)).note;
    const two = got(addContrast(one, { lumen: 'L2', wall: 'W1' }, NOW)).note;
    const { note: left, removedContrasts } = removeRegion(two, 'L1', LATER);
    expect(removedContrasts.map(({ id }) => id)).toEqual(['C1']);
    expect(left.contrasts.map(({ id }) => id)).toEqual(['C2']);
    expect(left.changedAt).toBe(LATER);
  });

  it('take their finding with them when no other region belongs to it', () => {
    const note = withRegions('lumen', 'plaque');
    const found = got(setFinding(note, 'L1', { segment: 7, kind: 'stent' }, NOW));
    expect(removeRegion(found, 'P1', NOW).note.findings).toHaveLength(1);
    expect(removeRegion(found, 'L1', NOW).note.findings).toEqual([]);
  });

  it('bring new values with a new shape, and contrasts are computed from them', () => {
    const note = withRegions('lumen', 'wall', 'reference');
    const before = got(addContrast(note, { lumen: 'L1', wall: 'W1' }, NOW)).note;
    const shape = ellipse(20, 8);
    const changed = got(
      changeRegion(before, 'L1', { shape, values: values(images, shape) }, LATER),
    );
    // Soft HU are 100 + column by construction, and an ellipse about a pixel centre is symmetric.
    expect(changed.region.soft?.meanHu).toBeCloseTo(120, 9);
    expect(changed.note.contrasts[0]?.soft).not.toBeCloseTo(before.contrasts[0]?.soft ?? 0, 3);
    expect(changed.removedContrasts).toEqual([]);
  });

  it('get a new name with a new role, and contrasts in the old role go', () => {
    const note = withRegions('lumen', 'wall', 'reference');
    const before = got(addContrast(note, { lumen: 'L1', wall: 'W1' }, NOW)).note;
    const changed = got(changeRegion(before, 'L1', { role: 'plaque' }, LATER));
    expect([changed.region.id, changed.region.label]).toEqual(['P1', 'Plaque 1']);
    expect(changed.removedContrasts.map(({ id }) => id)).toEqual(['C1']);
    const again = got(changeRegion(changed.note, 'P1', { role: 'lumen' }, LATER));
    expect(again.region.id).toBe('L2');
  });

  it('keep all else when only the place changes, and the old note is as it was', () => {
    const note = withRegions('lumen');
    const changed = got(changeRegion(note, 'L1', { place: 'in stent' }, LATER));
    expect(changed.region).toEqual({ ...note.regions[0], place: 'in stent' });
    expect(note.regions[0]?.place).toBe('');
  });

  it('that the note does not have are refused', () => {
    const result = changeRegion(emptyNote(images), 'L9', { place: 'x' }, NOW);
    expect(result).toEqual({
      ok: false,
      refusal: { code: 'unknown-region', text: 'The note has no region L9.' },
    });
  });

  it('make a verified note unverified when they are edited', () => {
    const note: Note = { ...withRegions('lumen'), verification: 'VERIFIED' };
    expect(removeRegion(note, 'L1', NOW).note.verification).toBe('UNVERIFIED');
  });
});
