import { describe, expect, it } from 'vitest';
import { mayState, setAnatomy, setComment, stateCondition } from '../../../../core/note/index.js';
import { LATER } from './noteFixture.js';
import { richNote } from './richNote.js';

describe('What the reader says of the whole reading', () => {
  it('is a comment, kept with its time', () => {
    const note = setComment(richNote(), 'motion in the distal part', LATER);
    expect([note.comment, note.changedAt]).toEqual(['motion in the distal part', LATER]);
    expect(setComment(note, note.comment, 'x')).toBe(note);
  });

  it('is the dominance, and the segments that this heart does not have', () => {
    const note = setAnatomy(richNote(), { absentSegments: [15, 4, 15] }, LATER);
    expect(note.anatomy).toEqual({ dominance: null, absentSegments: [4, 15] });
    const right = setAnatomy(note, { dominance: 'right' }, LATER);
    expect(right.anatomy).toEqual({ dominance: 'right', absentSegments: [4, 15] });
  });

  it('may be a condition that the files do not state, with its origin, and can be taken back', () => {
    const silent = richNote();
    expect(silent.conditions.contrastAgent).toBeNull();
    const stated = stateCondition(silent, 'contrastAgent', 'iodine, 70 ml', LATER);
    expect(stated.conditions.contrastAgent).toBe('iodine, 70 ml');
    expect(stated.conditionsByReader).toEqual(['contrastAgent']);
    const other = stateCondition(stated, 'contrastAgent', 'iodine, 60 ml', LATER);
    expect(other.conditionsByReader).toEqual(['contrastAgent']);
    const back = stateCondition(other, 'contrastAgent', null, LATER);
    expect([back.conditions.contrastAgent, back.conditionsByReader]).toEqual([null, []]);
  });

  it('never overwrites what a file states', () => {
    const note = richNote();
    expect([note.conditions.kvp, mayState(note, 'kvp')]).toEqual([120, false]);
    expect(stateCondition(note, 'kvp', 80, LATER)).toBe(note);
  });
});
