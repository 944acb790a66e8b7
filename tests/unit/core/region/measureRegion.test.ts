import { describe, expect, it } from 'vitest';
import { type CtImage, decodeImage, type StoredValues } from '../../../../core/dicom/index.js';
import {
  contrastFormula,
  contrastValue,
  findSlice,
  growShape,
  measureRegion,
  moveShape,
  pixelsInside,
  type RegionValue,
  type Shape,
  shapeArea,
  snrBand,
} from '../../../../core/region/index.js';
import { buildStacks, type Stack } from '../../../../core/stack/index.js';
import { type CtSliceOptions, ctSlice } from '../../../corpus/ctSlice.js';

/** Grid: first pixel at (−10, −20), rows 0.5 mm apart, columns 0.25 mm. Stored 1000 + index, so HU −24 + index. */
async function stackOf(slices: readonly CtSliceOptions[]): Promise<{
  stack: Stack;
  storedOf: (index: number) => StoredValues | undefined;
}> {
  const decoding = slices.map(async (options, number) => {
    const result = await decodeImage(ctSlice({ number, ...options }));
    if (!result.ok) throw new Error(result.refusal.text);
    return result.value;
  });
  const decoded = await Promise.all(decoding);
  const files = decoded.map(({ image }, fileId) => ({ fileId, file: `f${fileId}`, image }));
  const [stack] = buildStacks(files).stacks;
  if (stack === undefined) throw new Error('no stack');
  return { stack, storedOf: (index) => decoded[stack.slices[index]?.fileId ?? -1]?.stored };
}

const gridOf = (stack: Stack): CtImage['grid'] => stack.slices[0].image.grid;

const { stack } = await stackOf([{ z: 0 }]);
const { stack: gapped } = await stackOf([{ z: 0 }, { z: 1 }, { z: 2 }, { z: 6 }]);

describe('pixelsInside', () => {
  it('takes pixel centres on the edge of an ellipse', () => {
    const shape: Shape = { kind: 'ellipse', centreMm: [-9.5, -19.5, 0], radiiMm: [0.25, 0.5] };
    // Centre is column 2, row 1; the radii are one column and one row: the cross of five pixels.
    expect([...pixelsInside(shape, gridOf(stack)).indices]).toEqual([2, 6, 7, 8, 12]);
  });

  it('takes pixel centres on the edge and the corners of an outline', () => {
    const shape: Shape = {
      kind: 'outline',
      pointsMm: [
        [-10, -20, 0],
        [-9.5, -20, 0],
        [-9.5, -19.5, 0],
        [-10, -19.5, 0],
      ],
    };
    expect([...pixelsInside(shape, gridOf(stack)).indices]).toEqual([0, 1, 2, 5, 6, 7]);
  });

  it('turns with an ellipse’s own axes', () => {
    const turned: Shape = {
      kind: 'ellipse',
      centreMm: [-9.5, -19.5, 0],
      u: [0, 1, 0],
      v: [1, 0, 0],
      radiiMm: [0.5, 0.25],
    };
    expect([...pixelsInside(turned, gridOf(stack)).indices]).toEqual([2, 6, 7, 8, 12]);
  });

  it('says that a shape reaches over the border and keeps the part inside', () => {
    const shape: Shape = { kind: 'ellipse', centreMm: [-10, -20, 0], radiiMm: [0.3, 0.6] };
    expect(pixelsInside(shape, gridOf(stack))).toEqual({
      indices: Int32Array.of(0, 1, 5),
      overBorder: true,
    });
  });

  it('is even-odd for an outline that crosses itself', () => {
    // A bow tie over columns 0 to 4 and rows 0 to 4 of a grid of 0.25 mm by 0.5 mm.
    const bow: Shape = {
      kind: 'outline',
      pointsMm: [
        [-10, -20, 0],
        [-9, -18, 0],
        [-9, -20, 0],
        [-10, -18, 0],
      ],
    };
    const grid = { ...gridOf(stack), rows: 5, columns: 5 };
    expect([...pixelsInside(bow, grid).indices]).toEqual([
      0, 4, 5, 6, 8, 9, 10, 11, 12, 13, 14, 15, 16, 18, 19, 20, 24,
    ]);
  });

  it('takes the topmost and lowest corner of an outline', () => {
    const diamond: Shape = {
      kind: 'outline',
      pointsMm: [
        [-9.5, -20, 0],
        [-9.25, -19.5, 0],
        [-9.5, -19, 0],
        [-9.75, -19.5, 0],
      ],
    };
    expect([...pixelsInside(diamond, gridOf(stack)).indices]).toEqual([2, 6, 7, 8, 12]);
  });
});

describe('findSlice', () => {
  const at = (z: number): Shape => ({
    kind: 'ellipse',
    centreMm: [-9.5, -19.5, z],
    radiiMm: [1, 1],
  });

  it('takes the nearest slice within half the spacing and gives the offset', () => {
    const found = findSlice(at(1.3), gapped);
    expect(found.ok && found.value.sliceIndex).toBe(1);
    expect(found.ok && found.value.offsetMm).toBeCloseTo(-0.3, 12);
  });

  it('takes the first of two equally near slices, half the spacing away', () => {
    expect(findSlice(at(0.5), gapped)).toEqual({
      ok: true,
      value: { sliceIndex: 0, offsetMm: -0.5 },
    });
  });

  it('refuses a place in a gap, and beyond the ends', () => {
    for (const z of [4, -0.6, 6.6]) {
      expect(findSlice(at(z), gapped)).toMatchObject({
        ok: false,
        refusal: { code: 'no-slice-here' },
      });
    }
  });

  it('refuses a shape that leans against the slices', () => {
    const leaning: Shape = {
      kind: 'ellipse',
      centreMm: [0, 0, 1],
      u: [1, 0, 0],
      v: [0, 0.8, 0.6],
      radiiMm: [1, 1],
    };
    expect(findSlice(leaning, gapped)).toMatchObject({
      ok: false,
      refusal: { code: 'not-parallel' },
    });
  });
});

describe('measureRegion', () => {
  const five: Shape = { kind: 'ellipse', centreMm: [-9.5, -19.5, 0.1], radiiMm: [0.25, 0.5] };

  it('measures the pixels inside, nothing resampled', async () => {
    const { stack, storedOf } = await stackOf([{ z: 0 }, { z: 1 }]);
    // HU −22, −18, −17, −16, −12: mean −17, SD √13.
    expect(measureRegion(five, stack, storedOf)).toMatchObject({
      n: 5,
      meanHu: -17,
      sdHu: Math.sqrt(13),
      minHu: -22,
      maxHu: -12,
      medianHu: -17,
      areaMm2: Math.PI * 0.125,
      sampledAreaMm2: 0.625,
      snr: -17 / Math.sqrt(13),
      sliceIndex: 0,
      sliceOffsetMm: -0.1,
    });
  });

  it('leaves padding out and says how much', async () => {
    const padded = { 2621728: { tag: 0x00280120, vr: 'SS', value: 1007 } as const };
    const { stack, storedOf } = await stackOf([{ z: 0, change: padded }]);
    const value = measureRegion(five, stack, storedOf);
    expect([value.n, value.meanHu, value.flags.map((flag) => flag.code)]).toEqual([
      4,
      -17,
      // Half a millimetre wide, it can't be made 0.25 mm smaller on each side.
      ['no-standard-error', 'padding-inside', 'no-placement', 'few-pixels', 'edges-not-sought'],
    ]);
  });

  it('uses slope and intercept of the slice, not of the stack', async () => {
    const slope = { 2625619: { tag: 0x00281053, vr: 'DS', value: 2 } as const };
    const { stack, storedOf } = await stackOf([{ z: 0 }, { z: 1, change: slope }]);
    expect(measureRegion(moveShape(five, [0, 0, 1]), stack, storedOf).meanHu).toBe(990);
  });

  it('gives no SD of one pixel and no SNR of a flat region', async () => {
    const one: Shape = { kind: 'ellipse', centreMm: [-9.5, -19.5, 0], radiiMm: [0.1, 0.1] };
    const { stack, storedOf } = await stackOf([{ z: 0, stored: new Int16Array(20).fill(1100) }]);
    expect(measureRegion(one, stack, storedOf)).toMatchObject({
      n: 1,
      meanHu: 76,
      sdHu: null,
      snr: null,
    });
    const more: Shape = { kind: 'ellipse', centreMm: [-9.5, -19.5, 0], radiiMm: [0.4, 0.7] };
    const flat = measureRegion(more, stack, storedOf);
    expect([flat.sdHu, flat.snr, flat.placementHu]).toEqual([0, null, 0]);
    expect(flat.flags.map((flag) => flag.code)).toContain('zero-sd');
  });

  it('gives no HU where the file gives none, and says why', async () => {
    const { stack, storedOf } = await stackOf([{ z: 0, change: { 2625618: undefined } }]);
    const value = measureRegion(five, stack, storedOf);
    expect([value.meanHu, value.flags.map((flag) => flag.code)]).toEqual([null, ['not-hu']]);
  });

  it('says when the slice can’t be had', async () => {
    const { stack } = await stackOf([{ z: 0 }]);
    const value = measureRegion(five, stack, () => undefined);
    expect([value.meanHu, value.flags.map((flag) => flag.code)]).toEqual([null, ['slice-missing']]);
  });

  it('tells how far the mean moves with half a pixel', async () => {
    const { stack, storedOf } = await stackOf([{ z: 0, rows: 9, columns: 9 }]);
    const middle: Shape = { kind: 'ellipse', centreMm: [-9, -18, 0], radiiMm: [0.26, 0.51] };
    // Values rise by 9 a row and 1 a column; half a row down takes rows 4 and 5 instead of the cross around 4.
    expect(measureRegion(middle, stack, storedOf).placementHu).toBeGreaterThan(3);
  });
});

describe('shapes', () => {
  it('have the area of the ellipse and the shoelace area of the outline', () => {
    const triangle: Shape = {
      kind: 'outline',
      pointsMm: [
        [1, 2, 10],
        [3, 2, 10],
        [2, 4, 10],
      ],
    };
    expect(shapeArea(triangle)).toBe(2);
    expect(shapeArea({ kind: 'ellipse', centreMm: [0, 0, 0], radiiMm: [2, 3] })).toBeCloseTo(
      6 * Math.PI,
      12,
    );
  });

  it('never shrink to nothing', () => {
    const shape: Shape = { kind: 'ellipse', centreMm: [0, 0, 0], radiiMm: [0.5, 1] };
    expect(growShape(shape, -3, [0, 0, 0])).toMatchObject({ radiiMm: [0.1, 0.1] });
  });
});

describe('contrastValue', () => {
  const value = (meanHu: number, sdHu: number | null): RegionValue =>
    ({ meanHu, sdHu, flags: [] }) as unknown as RegionValue;
  const lumen = value(400, 20);
  const fat = value(-80, 12);
  const aorta = value(370, 25);

  // Computed from the published definitions: Herzog 2009 (SD of the aorta), and the pooled form.
  it.each([
    ['reference', 19.2],
    ['wall', 40],
    ['lumen', 24],
    ['pooled', 29.1043],
  ] as const)('with the noise from %s', (noise, expected) => {
    expect(contrastValue({ lumen, wall: fat, reference: aorta, noise }).value).toBeCloseTo(
      expected,
      4,
    );
  });

  it.each([
    ['no-reference', { lumen, wall: fat, noise: 'reference' }],
    ['zero-noise', { lumen: value(400, 0), wall: fat, noise: 'lumen' }],
    ['no-noise', { lumen: value(400, null), wall: fat, noise: 'lumen' }],
  ] as const)('has no value, with the reason %s', (code, parts) => {
    const got = contrastValue(parts);
    expect([got.value, got.flags[0]?.code]).toEqual([null, code]);
  });

  it('carries its formula', () => {
    expect(contrastFormula('reference')).toBe('CNR = (lumen − wall) / SD of reference');
  });
});

describe('snrBand', () => {
  it.each([
    [1, 'unreadable'],
    [1.01, 'poor'],
    [2, 'tolerable at best'],
    [4, 'tolerable at best'],
    [4.01, 'diagnostic'],
  ])('%d is %s', (snr, band) => expect(snrBand(snr)).toBe(band));
});
