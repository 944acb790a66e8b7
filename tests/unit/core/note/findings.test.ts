import { describe, expect, it } from 'vitest';
import { addRegion, clearFinding, type Note, setFinding } from '../../../../core/note/index.js';
import type { Result } from '../../../../core/result.js';
import { ellipse, emptyNote, NOW, pair } from './noteFixture.js';

const images = await pair();

function got<T>(result: Result<T>): T {
  if (!result.ok) throw new Error(result.refusal.text);
  return result.value;
}

function threeLumens(): Note {
  return [1, 2, 3].reduce(
    (note, n) =>
      addRegion(note, { role: 'lumen', shape: ellipse(3 * n, 9), soft: null, sharp: null }, NOW)
        .note,
    emptyNote(images),
  );
}

const STENT = { segment: 7, kind: 'stent', nominalMm: 3 } as const;
/** What nobody has said of a stent yet. */
const UNSAID = { lengthMm: null, overlap: null, location: '' } as const;
const findingOf = (note: Note, id: string) => note.regions.find((r) => r.id === id)?.findingId;

describe('findings of a note', () => {
  it('begin with the first region and are joined by a region that is alike', () => {
    const one = got(setFinding(threeLumens(), 'L1', STENT, NOW));
    const two = got(setFinding(one, 'L2', { segment: 7, kind: 'stent' }, NOW));
    expect(two.findings).toEqual([
      {
        id: 'D1',
        segment: 7,
        kind: 'stent',
        nominalMm: 3,
        lengthMm: null,
        overlap: null,
        location: '',
        assessability: null,
        reason: '',
      },
    ]);
    expect([findingOf(two, 'L1'), findingOf(two, 'L2'), findingOf(two, 'L3')]).toEqual([
      'D1',
      'D1',
      null,
    ]);
  });

  it('change for all their regions when the reader judges them', () => {
    const one = got(setFinding(threeLumens(), 'L1', STENT, NOW));
    const two = got(setFinding(one, 'L2', STENT, NOW));
    const judged = got(setFinding(two, 'L2', { assessability: 'limited', reason: 'motion' }, NOW));
    expect(judged.findings).toEqual([
      { id: 'D1', ...STENT, ...UNSAID, assessability: 'limited', reason: 'motion' },
    ]);
  });

  it('let go one region that moves to another segment, and keep the others', () => {
    const one = got(setFinding(threeLumens(), 'L1', STENT, NOW));
    const two = got(setFinding(one, 'L2', STENT, NOW));
    const moved = got(setFinding(two, 'L2', { segment: 8 }, NOW));
    expect(moved.findings.map(({ id, segment }) => [id, segment])).toEqual([
      ['D1', 7],
      ['D2', 8],
    ]);
    expect(findingOf(moved, 'L1')).toBe('D1');
    expect(findingOf(moved, 'L2')).toBe('D2');
  });

  it('go when their last region leaves', () => {
    const one = got(setFinding(threeLumens(), 'L1', STENT, NOW));
    expect(got(setFinding(one, 'L1', { segment: 8 }, NOW)).findings.map(({ id }) => id)).toEqual([
      'D2',
    ]);
    expect(clearFinding(one, 'L1', NOW).findings).toEqual([]);
  });

  it('keep two stents of other size in one segment apart until they are alike', () => {
    const one = got(setFinding(threeLumens(), 'L1', { ...STENT, reason: 'a' }, NOW));
    const two = got(setFinding(one, 'L2', { ...STENT, nominalMm: 3.5, reason: 'b' }, NOW));
    expect(two.findings).toHaveLength(2);
    const alike = got(setFinding(two, 'L2', { nominalMm: 3 }, NOW));
    expect(alike.findings).toEqual([
      { id: 'D2', ...STENT, ...UNSAID, assessability: null, reason: 'b; a' },
    ]);
    expect(findingOf(alike, 'L1')).toBe('D2');
  });

  it('are not begun without a kind', () => {
    const result = setFinding(threeLumens(), 'L1', { segment: 7 }, NOW);
    expect(result.ok ? undefined : result.refusal.code).toBe('no-kind');
  });
});
