import { describe, expect, it } from 'vitest';
import { beginNote } from '../../../../renderer/services/beginNote.js';
import {
  candidateByOrder,
  candidateOfNote,
  studiesOf,
} from '../../../../renderer/services/choosePair.js';
import { sampleStack, sampleState } from '../sample.js';

const stack = (series: string, seriesNumber: number, study?: string) =>
  sampleStack({ series, seriesNumber, ...(study === undefined ? {} : { study }) });

describe('What a folder shows without asking', () => {
  const three = stack('2.25.1', 3);
  const four = stack('2.25.2', 4);

  it('is its two stacks of one study, the lower series number as the soft one', () => {
    expect(candidateByOrder([four, three])).toEqual({ soft: three, sharp: four });
  });

  it('is its only stack alone', () => {
    expect(candidateByOrder([three])).toEqual({ soft: three, sharp: undefined });
  });

  it('is nothing when there is a choice to make', () => {
    expect(candidateByOrder([])).toBeUndefined();
    expect(candidateByOrder([three, four, stack('2.25.3', 5)])).toBeUndefined();
    expect(candidateByOrder([three, stack('2.25.3', 4, '2.25.9')])).toBeUndefined();
  });

  it('is the pair of the kept note where the folder has it', () => {
    const { note, pair } = sampleState();
    if (note === undefined || pair?.sharp === undefined) throw new Error('invalid sample');
    expect(candidateOfNote(note, [pair.sharp, pair.soft, three])).toEqual({
      soft: pair.soft,
      sharp: pair.sharp,
    });
    expect(candidateOfNote(note, [pair.soft, three])).toBeUndefined();
  });

  it('knows each study once', () => {
    expect(studiesOf([three, four, stack('2.25.3', 5, '2.25.9')])).toEqual([
      '2.25.88001.1',
      '2.25.9',
    ]);
  });
});

describe('The note of a pair', () => {
  const state = sampleState();
  const { pair, note } = state;
  if (pair === undefined || note === undefined) throw new Error('invalid sample');
  const setting = {
    pair,
    reader: 'R. Eader',
    version: '0.1.0',
    now: '2026-01-10T11:00:00Z',
    newId: () => 'new-id',
  };

  it('is a new one, synthetic as its images are', () => {
    expect(beginNote(undefined, setting)).toMatchObject({
      id: 'new-id',
      reader: 'R. Eader',
      synthetic: true,
      regions: [],
      pair: { link: 'position', soft: { key: '2.25.88001.2' }, sharp: { key: '2.25.88001.3' } },
    });
  });

  it('is the kept one as it is, on the same pair', () => {
    expect(beginNote(note, setting)).toBe(note);
  });

  it('loses the values of another pair, and keeps its regions', () => {
    const value = { n: 1 } as never;
    const region = {
      id: 'L1',
      role: 'lumen',
      label: 'Lumen 1',
      place: '',
      findingId: null,
      quote: null,
      quoteReason: '',
      quoteBy: 'proposal',
      shape: { kind: 'ellipse', centreMm: [0, 0, 0], radiiMm: [1, 1] },
      soft: value,
      sharp: value,
    } as const;
    const swapped = { ...pair, soft: pair.sharp ?? pair.soft, sharp: pair.soft };
    const begun = beginNote({ ...note, regions: [region] }, { ...setting, pair: swapped });
    expect(begun.pair.soft.key).toBe('2.25.88001.3');
    expect(begun.regions).toEqual([{ ...region, soft: null, sharp: null }]);
  });
});
