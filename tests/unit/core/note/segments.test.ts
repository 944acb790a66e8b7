import { describe, expect, it } from 'vitest';
import { SEGMENTS, segmentOf } from '../../../../core/note/segments.js';

describe('SEGMENTS', () => {
  it('numbers 18 segments from 1 to 18 in order', () => {
    expect(SEGMENTS.map(({ number }) => number)).toEqual(
      Array.from({ length: 18 }, (_, i) => i + 1),
    );
  });
  // Abbreviations of the SCCT model (Raff 2009, Leipsic 2014): from memory.
  it('has the abbreviations of the model', () => {
    expect(SEGMENTS.map(({ abbreviation }) => abbreviation)).toEqual([
      'pRCA',
      'mRCA',
      'dRCA',
      'R-PDA',
      'LM',
      'pLAD',
      'mLAD',
      'dLAD',
      'D1',
      'D2',
      'pLCx',
      'OM1',
      'LCx',
      'OM2',
      'L-PDA',
      'R-PLB',
      'RI',
      'L-PLB',
    ]);
  });
  it('finds none for null and for numbers outside the model', () => {
    expect(segmentOf(7)?.abbreviation).toBe('mLAD');
    expect(segmentOf(null)).toBeUndefined();
    expect(segmentOf(19)).toBeUndefined();
  });
});
