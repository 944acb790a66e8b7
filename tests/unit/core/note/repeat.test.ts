import { describe, expect, it } from 'vitest';
import {
  beginRepeat,
  finishRepeat,
  giveUpRepeat,
  type Note,
  pairedValues,
  putRepeated,
  readingsOfNotes,
  readingsOfRepeat,
  runningRepeat,
  skipRepeated,
} from '../../../../core/note/index.js';
import { ellipse, LATER, pair, values } from './noteFixture.js';
import { richNote } from './richNote.js';

const images = await pair();
const begun = (note = richNote()): Note => {
  const result = beginRepeat(note, { reader: 'Reader Two', now: LATER });
  if (!result.ok) throw new Error(result.refusal.text);
  return result.value;
};

describe('A repeat reading', () => {
  it('asks for the regions in their order, takes what is drawn, and leaves out what is skipped', () => {
    let note = begun();
    expect(runningRepeat(note)).toMatchObject({ next: { id: 'L1' }, step: 1, steps: 4 });
    const shape = ellipse(9, 9);
    note = putRepeated(note, shape, values(images, shape), LATER);
    expect(runningRepeat(note)).toMatchObject({ next: { id: 'W1' }, step: 2 });
    note = skipRepeated(note, LATER);
    expect(runningRepeat(note)).toMatchObject({ next: { id: 'R1' }, step: 3 });
    const finished = finishRepeat(note, LATER);
    expect(runningRepeat(finished)).toBeUndefined();
    expect(finished.repeats).toEqual([
      {
        id: 'T1',
        startedAt: LATER,
        finishedAt: LATER,
        reader: 'Reader Two',
        regions: [{ regionId: 'L1', shape, ...values(images, shape) }],
        skipped: ['W1'],
      },
    ]);
    // The first reading is as it was.
    expect(finished.regions).toEqual(richNote().regions);
  });

  it('is refused without regions and while another runs; one without anything drawn leaves nothing', () => {
    const code = (note: Note) => {
      const result = beginRepeat(note, { reader: '', now: LATER });
      return result.ok ? 'begun' : result.refusal.code;
    };
    expect(code({ ...richNote(), regions: [] })).toBe('no-regions');
    expect(code(begun())).toBe('repeat-running');
    expect(finishRepeat(begun(), LATER).repeats).toEqual([]);
    expect(giveUpRepeat(begun(), LATER).repeats).toEqual([]);
  });

  it('gives pairs of each number on each kernel, and says what was not drawn again', () => {
    let note = begun();
    const shape = ellipse(10, 9);
    note = putRepeated(note, shape, values(images, shape), LATER);
    note = finishRepeat(note, LATER);
    const [repeat] = note.repeats;
    if (repeat === undefined) throw new Error('no repeat');
    const readings = readingsOfRepeat(note, repeat);
    // The fixture's soft HU are 100 + column: columns 8 and 10.
    expect(pairedValues(readings, 'soft', 'meanHu')).toEqual({
      labels: ['Lumen 1'],
      first: [108],
      second: [110],
    });
    expect(readings.unmatched).toContain('Wall 1 was not drawn again.');
    expect(readings.secondName).toBe('repeat T1 by Reader Two');
  });
});

describe('Two readers’ notes of a study', () => {
  it('are matched by role and finding, the nearest first, and what is left is told', () => {
    const first = richNote();
    const shape = ellipse(15, 9);
    const second: Note = {
      ...richNote(),
      reader: 'Attending',
      regions: richNote()
        .regions.filter(({ id }) => id !== 'R1')
        .map((region) =>
          region.id === 'W1' ? { ...region, shape, ...values(images, shape) } : region,
        ),
    };
    const readings = readingsOfNotes(first, second);
    expect(readings.regions.map(({ label }) => label).sort()).toEqual([
      'Lumen 1',
      'Plaque 1',
      'Wall 1',
    ]);
    expect(readings.unmatched).toEqual(['Reference 1 of Reader One has no counterpart.']);
    const { labels, first: a, second: b } = pairedValues(readings, 'soft', 'meanHu');
    const wall = labels.indexOf('Wall 1');
    expect([a[wall], b[wall]]).toEqual([114, 115]);
  });
});
