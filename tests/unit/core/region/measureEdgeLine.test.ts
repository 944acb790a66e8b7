import { describe, expect, it } from 'vitest';
import type { StoredValues } from '../../../../core/dicom/index.js';
import { type BandLine, findLineSlice, measureEdgeLine } from '../../../../core/region/index.js';
import { gaussianStep } from '../../../corpus/edgePair.js';
import { axial, type SampleStack, sampleStack } from '../../renderer/sample.js';

/** 40 × 40 pixels of 0.5 mm from (−10, −20); a step of 600 HU at x = 0, blurred with σ 0.7 mm. */
const STORED: StoredValues = Int16Array.from({ length: 1600 }, (_, index) =>
  Math.round(600 * gaussianStep((-10 + (index % 40) * 0.5) / 0.7)),
);
const LINE: BandLine = { fromMm: [-6, -10, 2], toMm: [7, -10, 2], bandMm: 4 };

const on = (line: BandLine, options: SampleStack = {}, stored: StoredValues | undefined = STORED) =>
  measureEdgeLine(line, sampleStack(options), () => stored);
const codes = (line: BandLine, options?: SampleStack) =>
  on(line, options).flags.map(({ code }) => code);

describe('An edge line on a stack', () => {
  it('has rise and blur, levels, place and image, each with its unit', () => {
    const value = on(LINE);
    // 10–90 % is 2.563103 σ, FWHM 2.354820 σ; whole HU move the fit by less than a thousandth.
    expect(value.riseMm).toBeCloseTo(2.563103 * 0.7, 2);
    expect(value.blurFwhmMm).toBeCloseTo(2.35482 * 0.7, 2);
    expect(value.atMm).toBeCloseTo(6, 2);
    expect(value.fromHu).toBeCloseTo(0, 0);
    expect(value.toHu).toBeCloseTo(600, 0);
    expect(value).toMatchObject({
      // 27 columns from −6 to 7 mm, 9 rows from −12 to −8 mm, borders included.
      n: 243,
      sliceIndex: 2,
      sliceOffsetMm: 0,
      sopInstanceUid: '2.25.88001.2.3',
      frameNumber: null,
      flags: [],
    });
    expect(value.riseErrorMm).toBeLessThan(0.01);
  });

  it('is the same from either end, with levels and place turned', () => {
    const there = on(LINE);
    const back = on({ fromMm: LINE.toMm, toMm: LINE.fromMm, bandMm: 4 });
    expect(back.riseMm).toBeCloseTo(there.riseMm ?? 0, 6);
    expect(back.fromHu).toBeCloseTo(there.toHu ?? 0, 6);
    expect((back.atMm ?? 0) + (there.atMm ?? 0)).toBeCloseTo(13, 6);
  });

  it('is found on another stack by position, with its offset, under the rule of regions', () => {
    const stack = sampleStack({ positionsMm: axial(4, 1.5), sliceSpacingMm: 1.5 });
    expect(findLineSlice(LINE, stack)).toEqual({
      ok: true,
      value: { sliceIndex: 1, offsetMm: -0.5 },
    });
    expect(measureEdgeLine(LINE, stack, () => STORED)).toMatchObject({
      sliceIndex: 1,
      sliceOffsetMm: -0.5,
    });
  });

  it.each<[string, string, BandLine, SampleStack]>([
    ['no-slice-here', 'beyond the stack', { ...LINE, fromMm: [-6, -10, 9], toMm: [7, -10, 9] }, {}],
    ['not-parallel', 'that leans against the slices', { ...LINE, toMm: [7, -10, 3] }, {}],
    ['over-border', 'over the border', { ...LINE, toMm: [12, -10, 2] }, {}],
    ['not-hu', 'on values that are no HU', LINE, { unit: 'US' }],
    ['no-length', 'without length', { ...LINE, toMm: LINE.fromMm }, {}],
  ])('has no value and the reason %s %s', (code, _, line, options) => {
    expect(codes(line, options)).toEqual([code]);
    expect(on(line, options).riseMm).toBeNull();
  });

  it('has no value over padding, marked or not, nor on a slice that is missing', () => {
    const unmarked = Int16Array.from(STORED, (hu, index) => (index === 20 * 40 + 10 ? -2000 : hu));
    expect(on(LINE, {}, unmarked).flags[0]?.code).toBe('padding-inside');
    const missing = measureEdgeLine(LINE, sampleStack(), () => undefined);
    expect(missing.flags[0]?.code).toBe('slice-missing');
    expect(missing.sliceIndex).toBe(2);
  });
});
