import { describe, expect, it } from 'vitest';
import { noteStack, parsePlan, selectStack } from '../../../../core/note/index.js';
import { candidatesOf } from '../../../../core/pairing/candidates.js';
import { headerEvidence } from '../../../../core/pairing/index.js';
import { measureRegion } from '../../../../core/region/index.js';
import { isUnscaled, type Stack } from '../../../../core/stack/index.js';
import { candidateByOrder } from '../../../../renderer/services/choosePair.js';
import { pairMessage } from '../../../../renderer/services/pairMessage.js';
import { takesMarks } from '../../../../renderer/state/regionSelectors.js';
import { axial, sampleStack, sampleState } from '../../renderer/sample.js';

function unscaled(series: string, seriesNumber: number): Stack {
  const stack = sampleStack({
    series,
    seriesNumber,
    positionsMm: axial(12, 1),
    pixelSpacingMm: [1, 1],
  });
  const [first, ...rest] = stack.slices.map((slice) => ({
    ...slice,
    image: { ...slice.image, grid: { ...slice.image.grid, unscaled: true as const } },
  }));
  if (first === undefined) throw new Error('invalid sample');
  return { ...stack, slices: [first, ...rest] };
}

const scaled = (series: string, seriesNumber: number): Stack =>
  sampleStack({ series, seriesNumber, positionsMm: axial(12, 1), pixelSpacingMm: [1, 1] });

// AWKWARD row 88: no spacing means pixels only.
describe('A stack without a pixel spacing', () => {
  const bare = unscaled('2.25.7.1', 1);

  it('is not measured, though a region lies on it', () => {
    expect(isUnscaled(bare)).toBe(true);
    const shape = { kind: 'ellipse', centreMm: [0, -10, 0], radiiMm: [4, 4] } as const;
    const stored = new Int16Array(40 * 40).fill(50);
    expect(measureRegion(shape, scaled('2.25.7.2', 2), () => stored).meanHu).toBe(50);
    const value = measureRegion(shape, bare, () => stored);
    expect([value.n, value.meanHu, value.sdHu, value.snr]).toEqual([0, null, null, null]);
    expect(value.flags.map(({ code }) => code)).toEqual(['no-pixel-spacing']);
  });

  it('is part of no pair, and no pair is proposed with it', () => {
    const other = scaled('2.25.7.2', 2);
    for (const [a, b] of [
      [bare, other],
      [other, bare],
      [bare, unscaled('2.25.7.3', 3)],
    ] as const) {
      const { refusal, evidence } = headerEvidence(a, b);
      expect(refusal).toBe(
        'Nothing to compare: without a pixel spacing no place on one stack is known on the other',
      );
      // The spacing of 1 that lays it out on the screen is never told as one of the file.
      const said = evidence.filter(({ check }) => /pixel spacing|field of view/.test(check));
      expect(said.map(({ text }) => text).join(' ')).not.toMatch(/\d/);
    }
    expect(candidatesOf([bare, other])).toEqual([]);
    expect(candidatesOf([scaled('2.25.7.4', 4), other])).toHaveLength(1);
  });

  it('can’t be named by a plan, and the note keeps no spacing of it', () => {
    const parsed = parsePlan({ plan: 1, pair: { soft: { seriesInstanceUid: '2.25.7.1' } } });
    if (!parsed.ok) throw new Error(parsed.refusal.text);
    expect(selectStack(parsed.value.plan.pair.soft, [bare])).toMatchObject({
      ok: false,
      refusal: { code: 'no-pixel-spacing' },
    });
    expect(noteStack(bare).pixelSpacingMm).toBeNull();
  });

  it('is shown alone where there is nothing else, takes no marks, and the reader is told', () => {
    const other = scaled('2.25.7.2', 2);
    expect(candidateByOrder([bare])).toEqual({ soft: bare, sharp: undefined });
    expect(candidateByOrder([bare, other])).toEqual({ soft: other, sharp: undefined });
    expect(candidateByOrder([bare, unscaled('2.25.7.3', 3)])).toBeUndefined();
    const state = sampleState({ soft: bare });
    expect(takesMarks(state, 'soft')).toBe(false);
    expect(takesMarks(sampleState({ soft: other }), 'soft')).toBe(true);
    if (state.pair === undefined) throw new Error('invalid sample');
    expect(pairMessage({ ...state.pair, sharp: undefined })?.text).toContain('no pixel spacing');
  });
});
