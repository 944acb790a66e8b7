import { describe, expect, it } from 'vitest';
import {
  addStent,
  assignStent,
  changeStent,
  type Note,
  NoteSchema,
  noStentValue,
  removeStent,
  type StentValue,
  withStentFits,
} from '../../../../core/note/index.js';
import { sampleNote } from '../../app/host/sampleNote.js';
import { STENT_FIT } from '../report/linesNote.js';
import { richNote } from './richNote.js';

const NOW = '2026-01-12T08:00:00Z';
const PLACE = { centreMm: [-6.5, -15.25, 2], nominalMm: 3 } as const;
const REASON: StentValue = noStentValue({ code: 'not-round', text: 'Not round.' });

function added(): Note {
  return addStent(sampleNote(), PLACE, STENT_FIT, NOW).note;
}

describe('Fitted stents of a note', () => {
  it('are added with name, place and fit, and with the finding that they belong to', () => {
    const { note, stent } = addStent(richNote(), { ...PLACE, plane: 'O1' }, STENT_FIT, NOW, 'D1');
    expect(stent).toEqual({
      id: 'S1',
      label: 'Stent 1',
      ...PLACE,
      plane: 'O1',
      findingId: 'D1',
      fit: STENT_FIT,
    });
    expect(NoteSchema.parse(JSON.parse(JSON.stringify(note)))).toEqual(note);
  });

  it('are numbered, and a number is not used again after a removal', () => {
    const gone = removeStent(added(), 'S1', NOW);
    expect(gone.stents).toEqual([]);
    expect(addStent(gone, PLACE, null, NOW).stent).toMatchObject({ id: 'S2', findingId: null });
    expect(removeStent(gone, 'S1', NOW)).toBe(gone);
  });

  it('keep a place where none could be fitted, with the reason and no number', () => {
    expect(REASON).toEqual({
      strutDiameterMm: null,
      lumenHu: null,
      wallWidthMm: null,
      wallHu: null,
      strutMassHuMm: null,
      blurSigmaMm: null,
      refitted: null,
      axisMm: null,
      axis: null,
      tiltDeg: null,
      goodness: null,
      plain: null,
      slices: 0,
      images: [],
      reason: { code: 'not-round', text: 'Not round.' },
    });
    const { note } = addStent(sampleNote(), PLACE, REASON, NOW);
    expect(NoteSchema.parse(note).stents[0]?.fit).toEqual(REASON);
  });

  it('change place and fit together, keeping name and finding', () => {
    const { note } = addStent(richNote(), PLACE, STENT_FIT, NOW, 'D1');
    const moved = changeStent(note, 'S1', { centreMm: [1, 2, 3] }, REASON, NOW);
    expect(moved.ok && moved.value.stent).toEqual({
      id: 'S1',
      label: 'Stent 1',
      findingId: 'D1',
      centreMm: [1, 2, 3],
      fit: REASON,
    });
    expect(changeStent(note, 'S9', PLACE, null, NOW)).toMatchObject({
      refusal: { code: 'unknown-stent' },
    });
  });

  it('are given to a finding of the note and taken from it', () => {
    const { note } = addStent(richNote(), PLACE, STENT_FIT, NOW);
    const given = assignStent(note, 'S1', 'D1', NOW);
    expect(given.ok && given.value.stents[0]?.findingId).toBe('D1');
    const taken = given.ok ? assignStent(given.value, 'S1', null, NOW) : given;
    expect(taken.ok && taken.value.stents[0]?.findingId).toBeNull();
    expect(assignStent(note, 'S1', 'D9', NOW)).toMatchObject({
      refusal: { code: 'unknown-finding' },
    });
    expect(assignStent(note, 'S9', 'D1', NOW)).toMatchObject({
      refusal: { code: 'unknown-stent' },
    });
  });

  it('keep their fit while images are still to come, and then stay the same note', () => {
    const note = added();
    expect(withStentFits(note, () => null, NOW)).toBe(note);
    expect(withStentFits(note, () => STENT_FIT, NOW)).toBe(note);
    expect(withStentFits(note, () => REASON, NOW).stents[0]?.fit).toEqual(REASON);
  });

  it('are absent in an older note', () => {
    const { stents: _, ...older } = sampleNote();
    expect(NoteSchema.parse(older).stents).toEqual([]);
  });
});
