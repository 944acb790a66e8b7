import { describe, expect, it } from 'vitest';
import { beginNote } from '../../../../renderer/services/beginNote.js';
import { candidateOfNote } from '../../../../renderer/services/choosePair.js';
import { asOnPlates, isMasked, withMaskTurned } from '../../../../renderer/services/masking.js';
import type { PairState } from '../../../../renderer/state/appState.js';
import { sampleStack, sampleState } from '../sample.js';

const { pair, note } = sampleState();
if (pair?.sharp === undefined || note === undefined) throw new Error('invalid sample');
const read = [pair.soft, pair.sharp];

function turned(from: PairState): PairState {
  const result = withMaskTurned(from, read);
  if (!result.ok) throw new Error(result.refusal.text);
  return { ...from, soft: result.value.soft, sharp: result.value.sharp };
}

const setting = { reader: '', version: '0.1.0', now: '2026-01-10T11:00:00Z', newId: () => 'new' };

describe('Leaving unmarked padding out', () => {
  it('masks both stacks, and gives them back as they were read', () => {
    const masked = turned(pair);
    expect([masked.soft.maskedBelowHu, masked.sharp?.maskedBelowHu]).toEqual([-1500, -1500]);
    expect(isMasked(masked)).toBe(true);
    const back = turned(masked);
    expect(back.soft).toBe(pair.soft);
    expect(back.sharp).toBe(pair.sharp);
  });

  it('masks neither where one of them can’t be', () => {
    const sharp = sampleStack({ series: '2.25.88001.3', unit: 'stored' });
    expect(withMaskTurned({ ...pair, sharp }, read)).toMatchObject({
      ok: false,
      refusal: { code: 'no-mask' },
    });
  });

  it('stays when the same stacks are chosen again, and goes with another one', () => {
    const masked = turned(pair);
    expect(asOnPlates({ soft: pair.soft, sharp: pair.sharp }, masked).soft).toBe(masked.soft);
    expect(asOnPlates({ soft: read[1] ?? pair.soft, sharp: pair.soft }, masked)).toEqual({
      soft: masked.sharp,
      sharp: masked.soft,
    });
    const other = sampleStack({ series: '2.25.88001.9' });
    expect(asOnPlates({ soft: pair.soft, sharp: other }, masked).soft).toBe(pair.soft);
  });

  it('is in the note, whose values were measured otherwise and go; a note that has it opens so', () => {
    const region = {
      id: 'L1',
      role: 'lumen',
      shape: { kind: 'ellipse', centreMm: [0, -10, 2], radiiMm: [2, 2] },
      label: 'Lumen 1',
      place: '',
      findingId: null,
      quote: null,
      quoteReason: '',
      quoteBy: 'proposal',
      soft: null,
      sharp: null,
    } as const;
    const kept = { ...note, verification: 'VERIFIED', regions: [region] } as const;
    const begun = beginNote(kept, { pair: turned(pair), ...setting });
    expect(begun.pair.soft.maskedBelowHu).toBe(-1500);
    expect(begun.pair.sharp?.findings.map(({ code }) => code)).toEqual(['masked-padding']);
    expect(begun.verification).toBe('UNVERIFIED');
    expect(begun.regions.map(({ id }) => id)).toEqual(['L1']);
    const opened = candidateOfNote(begun, read);
    expect([opened?.soft.maskedBelowHu, opened?.sharp?.maskedBelowHu]).toEqual([-1500, -1500]);
    if (opened === undefined) throw new Error('not opened');
    expect(beginNote(begun, { pair: { ...pair, ...opened, overrides: [] }, ...setting })).toBe(
      begun,
    );
  });
});
