import { describe, expect, it } from 'vitest';
import {
  addPlane,
  addProfile,
  changePlane,
  type Note,
  NoteSchema,
  removePlane,
  removeProfile,
  withCutFacts,
} from '../../../../core/note/index.js';
import { sampleNote } from '../../app/host/sampleNote.js';

const NOW = '2026-01-12T08:00:00Z';
const PLACE = {
  courseMm: [
    [0, 0, 0],
    [1, 0, 1],
  ],
  interpolation: 'cubic',
  slabMm: 1.5,
} as const;
const FACTS = {
  angleDeg: 45,
  resampling: 'cubic convolution, mean over 1.5 mm',
  source: { soft: null, sharp: null },
} as const;
const LINE = { fromMm: [-1, 0, 1], toMm: [1, 0, -1], bandMm: 1, plane: 'O1' } as const;

function added(): Note {
  return addPlane(sampleNote(), PLACE, FACTS, NOW).note;
}

/** A note with a profile on its cut. */
function used(): Note {
  return addProfile(added(), LINE, { soft: null, sharp: null }, NOW).note;
}

describe('Oblique planes of a note', () => {
  it('are added with name, course and what is known of the cut', () => {
    const { note, plane } = addPlane(sampleNote(), PLACE, FACTS, NOW);
    expect(plane).toEqual({ id: 'O1', label: 'Cut 1', ...PLACE, ...FACTS });
    expect(NoteSchema.parse(JSON.parse(JSON.stringify(note)))).toEqual(note);
  });

  it('are numbered, and a number is not used again after a removal', () => {
    const gone = removePlane(added(), 'O1', NOW);
    if (!gone.ok) throw new Error(gone.refusal.text);
    expect(gone.value.planes).toEqual([]);
    expect(addPlane(gone.value, PLACE, FACTS, NOW).plane.id).toBe('O2');
  });

  it('lie elsewhere after a change, with what is known of the new cut', () => {
    const facts = { ...FACTS, angleDeg: 30, resampling: 'trilinear interpolation' };
    const changed = changePlane(added(), 'O1', { courseMm: PLACE.courseMm }, facts, NOW);
    expect(changed.ok && changed.value.plane).toEqual({
      id: 'O1',
      label: 'Cut 1',
      courseMm: PLACE.courseMm,
      ...facts,
    });
    expect(changePlane(added(), 'O9', PLACE, FACTS, NOW)).toMatchObject({
      refusal: { code: 'unknown-plane' },
    });
  });

  it('stay as they are while something is measured on them', () => {
    expect(changePlane(used(), 'O1', PLACE, FACTS, NOW)).toMatchObject({
      refusal: { code: 'plane-used' },
    });
    expect(removePlane(used(), 'O1', NOW)).toMatchObject({ refusal: { code: 'plane-used' } });
    const free = removePlane(removeProfile(used(), 'X1', NOW), 'O1', NOW);
    expect(free.ok && free.value.planes).toEqual([]);
  });

  it('take what is known of a new cut, and stay the same note where nothing is new', () => {
    const note = added();
    expect(withCutFacts(note, () => null, NOW)).toBe(note);
    expect(withCutFacts(note, () => FACTS, NOW)).toBe(note);
    const facts = { ...FACTS, angleDeg: 44 };
    expect(withCutFacts(note, () => facts, NOW).planes[0]?.angleDeg).toBe(44);
  });

  it('are absent in an older note', () => {
    const { planes: _, ...older } = sampleNote();
    expect(NoteSchema.parse(older).planes).toEqual([]);
  });
});
