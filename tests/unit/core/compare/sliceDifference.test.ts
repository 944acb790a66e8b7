import { describe, expect, it } from 'vitest';
import {
  type ComparedSlice,
  finerSlice,
  latticeMap,
  sliceDifference,
} from '../../../../core/compare/index.js';
import type { PixelEncoding } from '../../../../core/dicom/index.js';
import type { SliceGrid, Vec3 } from '../../../../core/geometry/index.js';

const grid = (
  positionMm: Vec3,
  spacingMm: number,
  rows: number,
  columns: number,
  more: Partial<SliceGrid> = {},
): SliceGrid => ({
  positionMm,
  rowDirection: [1, 0, 0],
  columnDirection: [0, 1, 0],
  pixelSpacingMm: [spacingMm, spacingMm],
  rows,
  columns,
  ...more,
});

const PIXELS: PixelEncoding = {
  bitsAllocated: 16,
  bitsStored: 16,
  highBit: 15,
  signed: true,
  photometric: 'MONOCHROME2',
  rescale: { slope: 1, intercept: -1024 },
  unit: 'HU',
};

const slice = (
  of: SliceGrid,
  stored: readonly number[],
  pixels: Partial<PixelEncoding> = {},
): ComparedSlice => ({
  grid: of,
  pixels: { ...PIXELS, ...pixels },
  stored: Int16Array.from(stored),
});

const huOf = (soft: ComparedSlice, sharp: ComparedSlice): readonly number[] => [
  ...(sliceDifference(soft, sharp)?.hu ?? []),
];

describe('The difference of two slices', () => {
  const same = grid([0, 0, 0], 0.5, 2, 2);

  it('is sharp minus soft in HU, with each slice’s own rescale', () => {
    const soft = slice(same, [1000, 1100, 1200, 1300]);
    const sharp = slice(same, [0, 50, 100, 150], { rescale: { slope: 2, intercept: 10 } });
    // Soft −24, 76, 176, 276 HU; sharp 10, 110, 210, 310 HU.
    expect(huOf(soft, sharp)).toEqual([34, 34, 34, 34]);
    expect(sliceDifference(soft, sharp)?.interpolated).toBe(false);
  });

  it('has no data where either holds padding', () => {
    const padding = { low: -2000, high: -2000 };
    const soft = slice(same, [-2000, 1, 2, 3], { padding });
    const sharp = slice(same, [5, 5, -2000, 5], { padding });
    expect(huOf(soft, sharp)).toEqual([NaN, 4, NaN, 2]);
  });

  it('lies on the finer pixels, the coarser slice interpolated between its own', () => {
    // The coarse slice rises by 8 HU a pixel of 1 mm, so by 4 HU each 0.5 mm: bilinear interpolation is exact on it.
    const soft = slice(grid([0, 0, 0], 1, 2, 2), [0, 8, 0, 8]);
    const sharp = slice(grid([0, 0, 0], 0.5, 2, 3), [10, 10, 10, 10, 10, 10]);
    expect(huOf(soft, sharp)).toEqual([10, 6, 2, 10, 6, 2]);
    expect(huOf(sharp, soft)).toEqual([-10, -6, -2, -10, -6, -2]);
    expect(sliceDifference(soft, sharp)?.interpolated).toBe(true);
  });

  it('goes by position in the patient, and has no data outside of either', () => {
    const soft = slice(same, [1, 2, 3, 4]);
    const sharp = slice(grid([0.5, 0, 0], 0.5, 2, 2), [20, 30, 40, 50]);
    expect(huOf(soft, sharp)).toEqual([NaN, 18, NaN, 36]);
  });

  it('asks no neighbour that has no weight, so that padding beside a pixel takes nothing from it', () => {
    const soft = slice(grid([0, 0, 0], 0.5, 1, 3), [0, 0, 0]);
    const padding = { low: -2000, high: -2000 };
    const sharp = slice(grid([0, 0, 0], 1, 1, 2), [9, -2000], { padding });
    expect(huOf(soft, sharp)).toEqual([9, NaN, NaN]);
  });

  it('is none for slices that are turned, and none without HU', () => {
    const soft = slice(same, [1, 2, 3, 4]);
    const turned = slice(
      { ...same, rowDirection: [0, 1, 0], columnDirection: [-1, 0, 0] },
      [1, 2, 3, 4],
    );
    expect(sliceDifference(soft, turned)).toBeUndefined();
    expect(sliceDifference(soft, slice(same, [1, 2, 3, 4], { unit: 'stored' }))).toBeUndefined();
  });
});

describe('The map from one lattice to another', () => {
  it('is whole where both fall together but for rounded headers', () => {
    const map = latticeMap(
      grid([0, 0, 0], 0.390625, 512, 512),
      grid([-0.7812501, 0, 0], 0.3906251, 512, 512),
    );
    expect(map).toEqual({ columnStep: 1, columnOffset: 2, rowStep: 1, rowOffset: 0 });
  });
});

describe('The finer slice', () => {
  it('is the soft one when both are as fine', () => {
    expect(finerSlice(grid([0, 0, 0], 0.5, 2, 2), grid([0, 0, 0], 0.5, 4, 4))).toBe('soft');
    expect(finerSlice(grid([0, 0, 0], 0.5, 2, 2), grid([0, 0, 0], 0.4, 4, 4))).toBe('sharp');
  });
});
