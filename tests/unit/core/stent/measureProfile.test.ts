import { describe, expect, it } from 'vitest';
import { measureProfile } from '../../../../core/stent/index.js';
import { axial, sampleStack } from '../../renderer/sample.js';

const SIZE = 40;
const SPACING = 0.5;

/** An image of Gaussian humps around a line at y: values by distance from x, HU as stored. */
function stored(huAt: (xMm: number, yMm: number) => number): Int16Array {
  return Int16Array.from({ length: SIZE * SIZE }, (_, index) =>
    Math.round(huAt(-10 + (index % SIZE) * SPACING, -20 + Math.floor(index / SIZE) * SPACING)),
  );
}

const gauss = (x: number, sigma: number): number => Math.exp((-x * x) / (2 * sigma * sigma));
const stack = sampleStack({
  positionsMm: axial(3, 1),
  pixelSpacingMm: [SPACING, SPACING],
  rows: SIZE,
  columns: SIZE,
});
const LINE = { fromMm: [-6, -10, 1], toMm: [6, -10, 1], bandMm: 1 } as const;

describe('measureProfile', () => {
  const struts = stored((x) => 1000 * (gauss(x + 1.5, 0.55) + gauss(x - 1.5, 0.55)));

  it('samples in quarters of the pixel and averages over the band', () => {
    const { samples } = measureProfile(LINE, stack, () => struts);
    expect(samples?.atMm.length).toBe(97);
    expect(samples?.atMm[1]).toBeCloseTo(0.125, 12);
    expect(samples?.hu[48]).toBeCloseTo(2000 * gauss(1.5, 0.55), -1);
  });

  it('tells artificial lumen narrowing against the nominal inner diameter', () => {
    const value = measureProfile({ ...LINE, nominalMm: 3 }, stack, () => struts);
    expect(value.kind).toBe('stent');
    // The peaks lie on pixels; between pixels of 0.5 mm the cubic keeps a Gaussian of 0.55 mm to a few hundredths.
    expect(value.peakDistanceMm).toBeCloseTo(3, 2);
    expect(value.visibleWidthMm).toBeCloseTo(3 - 2.35482 * 0.55, 0);
    expect(value.narrowing).toBeCloseTo(1 - (value.visibleWidthMm ?? 0) / 3, 12);
    // What is told of a profile whose kernel's noise was not measured.
    expect(value.flags.map(({ code }) => code)).toEqual(['noise-unknown']);
  });

  it('says so where no nominal diameter was given', () => {
    const value = measureProfile(LINE, stack, () => struts);
    expect(value.narrowing).toBeNull();
    expect(value.flags.map(({ code }) => code)).toEqual(['no-nominal', 'noise-unknown']);
  });

  it('gives no width where a stent is expected and the struts are not told apart', () => {
    const hump = stored((x) => 700 * gauss(x, 1.2));
    const value = measureProfile({ ...LINE, nominalMm: 3 }, stack, () => hump);
    expect(value).toMatchObject({ visibleWidthMm: null, struts: [], narrowing: null });
    expect(value.flags.map(({ code }) => code)).toEqual(['struts-not-apart']);
    expect(value.samples).not.toBeNull();
  });

  it('gives the width of a native lumen', () => {
    const hump = stored((x) => 400 * gauss(x, 1.2));
    const value = measureProfile(LINE, stack, () => hump);
    expect(value.kind).toBe('lumen');
    expect(value.visibleWidthMm).toBeCloseTo(2.35482 * 1.2, 1);
    expect(value.flags).toEqual([]);
  });

  it('is measured on the nearest slice, and says which', () => {
    const value = measureProfile(
      { ...LINE, fromMm: [-6, -10, 1.3], toMm: [6, -10, 1.3] },
      stack,
      () => struts,
    );
    expect(value).toMatchObject({
      sliceIndex: 1,
      sopInstanceUid: stack.slices[1]?.image.sopInstanceUid,
    });
    expect(value.sliceOffsetMm).toBeCloseTo(-0.3, 9);
  });

  it.each([
    ['over the border', { ...LINE, fromMm: [-12, -10, 1] as const }, 'over-border'],
    ['against the slices', { ...LINE, toMm: [6, -10, 3] as const }, 'not-parallel'],
    ['without length', { ...LINE, toMm: LINE.fromMm }, 'no-length'],
    [
      'beyond the stack',
      { ...LINE, fromMm: [-6, -10, 9] as const, toMm: [6, -10, 9] as const },
      'no-slice-here',
    ],
  ])('is not measured %s', (_, line, code) => {
    const value = measureProfile(line, stack, () => struts);
    expect(value.visibleWidthMm).toBeNull();
    expect(value.flags.map((flag) => flag.code)).toEqual([code]);
  });

  it('is not measured where the slice is missing or holds no HU', () => {
    expect(measureProfile(LINE, stack, () => undefined).flags[0]?.code).toBe('slice-missing');
    expect(measureProfile(LINE, sampleStack({ unit: 'US' }), () => struts).flags[0]?.code).toBe(
      'not-hu',
    );
  });
});
