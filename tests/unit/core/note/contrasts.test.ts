import { describe, expect, it } from 'vitest';
import {
  addContrast,
  addRegion,
  changeContrast,
  type Note,
  removeContrast,
  setNoise,
  withValues,
} from '../../../../core/note/index.js';
import type { RegionValue, Role } from '../../../../core/region/index.js';
import type { Result } from '../../../../core/result.js';
import { ellipse, emptyNote, LATER, NOW, pair } from './noteFixture.js';

const images = await pair();

function got<T>(result: Result<T>): T {
  if (!result.ok) throw new Error(result.refusal.text);
  return result.value;
}

function value(meanHu: number, sdHu: number): RegionValue {
  return {
    n: 50,
    meanHu,
    sdHu,
    minHu: meanHu - sdHu,
    maxHu: meanHu + sdHu,
    medianHu: meanHu,
    areaMm2: 6,
    sampledAreaMm2: 6,
    snr: meanHu / sdHu,
    sliceIndex: 1,
    sliceOffsetMm: 0,
    sopInstanceUid: '1.2.3',
    frameNumber: null,
    standardErrorHu: null,
    placementHu: null,
    flags: [],
  };
}

/**
 * Lumen 400/SD 20, fat −80/SD 12, aorta SD 25: figures worked by hand from the definitions in Herzog 2009
 * (Int J Cardiovasc Imaging 25:625) for the reference's SD, and of the pooled SD.
 */
function worked(): Note {
  const parts: [Role, RegionValue, RegionValue | null][] = [
    ['lumen', value(400, 20), value(400, 40)],
    ['wall', value(-80, 12), value(-80, 12)],
    ['reference', value(380, 25), null],
  ];
  return parts.reduce(
    (note, [role, soft, sharp]) =>
      addRegion(note, { role, shape: ellipse(9, 9), soft, sharp }, NOW).note,
    emptyNote(images),
  );
}

describe('contrasts of a note', () => {
  it('take the noise of the note and its only reference', () => {
    const { contrast } = got(addContrast(worked(), { lumen: 'L1', wall: 'W1' }, NOW));
    expect(contrast).toEqual({
      id: 'C1',
      lumen: 'L1',
      wall: 'W1',
      noise: 'reference',
      reference: 'R1',
      formula: 'CNR = (lumen − wall) / SD of reference',
      soft: 19.2,
      sharp: null,
      flags: [
        {
          code: 'not-measured',
          text: 'Sharp kernel: Region R1 is not measured, so there is no contrast.',
        },
      ],
    });
  });

  it('are all computed anew when the note takes another noise', () => {
    const note = got(addContrast(worked(), { lumen: 'L1', wall: 'W1' }, NOW)).note;
    const softOf = (changed: Note) => changed.contrasts[0]?.soft;
    expect(softOf(setNoise(note, 'lumen', LATER))).toBe(24);
    expect(softOf(setNoise(note, 'wall', LATER))).toBe(40);
    expect(softOf(setNoise(note, 'pooled', LATER))).toBeCloseTo(29.1043, 4);
    const lumen = setNoise(note, 'lumen', LATER);
    expect(lumen.contrasts[0]?.sharp).toBe(12);
    expect(lumen.contrasts[0]?.flags).toEqual([]);
    expect(lumen.noise).toBe('lumen');
  });

  it('can be changed in one part', () => {
    const note = got(addContrast(worked(), { lumen: 'L1', wall: 'W1' }, NOW)).note;
    const changed = got(changeContrast(note, 'C1', { noise: 'wall' }, LATER));
    expect(changed.contrasts[0]?.soft).toBe(40);
    expect(changed.noise).toBe('reference');
  });

  it.each([
    ['unknown-region', { lumen: 'L7', wall: 'W1' }],
    ['same-region', { lumen: 'L1', wall: 'L1' }],
  ])('are refused with %s', (code, parts) => {
    const result = addContrast(worked(), parts, NOW);
    expect(result.ok ? undefined : result.refusal.code).toBe(code);
  });

  it('need a choice when the note has two references', () => {
    const two = addRegion(
      worked(),
      { role: 'reference', shape: ellipse(3, 3), soft: value(0, 9), sharp: null },
      NOW,
    ).note;
    const result = addContrast(two, { lumen: 'L1', wall: 'W1' }, NOW);
    expect(result.ok ? undefined : result.refusal.code).toBe('no-reference');
  });

  it('never use a number twice', () => {
    const one = got(addContrast(worked(), { lumen: 'L1', wall: 'W1' }, NOW)).note;
    const none = removeContrast(one, 'C1', LATER);
    expect(none.contrasts).toEqual([]);
    expect(got(addContrast(none, { lumen: 'L1', wall: 'W1' }, LATER)).contrast.id).toBe('C2');
  });

  it('follow when every region is measured again', () => {
    const note = got(addContrast(worked(), { lumen: 'L1', wall: 'W1' }, NOW)).note;
    const again = withValues(
      note,
      ({ role }) => ({ soft: role === 'lumen' ? value(420, 20) : value(-80, 25), sharp: null }),
      LATER,
    );
    expect(again.contrasts[0]?.soft).toBe(20);
    expect(again.contrasts[0]?.sharp).toBeNull();
    expect(again.changedAt).toBe(LATER);
  });
});
