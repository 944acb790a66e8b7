import { describe, expect, it } from 'vitest';
import { type CtImage, readHeader } from '../../../../core/dicom/index.js';
import { buildStacks } from '../../../../core/stack/index.js';
import { CORPUS_ROOT, type CtSliceOptions, ctSlice } from '../../../corpus/ctSlice.js';

function image(options: CtSliceOptions): CtImage {
  const bytes = ctSlice(options);
  const reading = readHeader(bytes, bytes.length);
  if (reading.kind !== 'image') throw new Error(reading.kind);
  return reading.images[0];
}

function stacksOf(slices: readonly CtSliceOptions[]) {
  return buildStacks(
    slices.map((options, fileId) => ({ fileId, file: `f${fileId}`, image: image(options) })),
  );
}

describe('buildStacks', () => {
  it('orders by position along the normal, not by instance number', () => {
    const { stacks } = stacksOf([
      { z: 3, number: 1 },
      { z: 1, number: 2 },
      { z: 2, number: 3 },
    ]);
    expect(stacks).toHaveLength(1);
    expect(stacks[0]?.slices.map((slice) => [slice.file, slice.alongMm])).toEqual([
      ['f1', 1],
      ['f2', 2],
      ['f0', 3],
    ]);
    expect(stacks[0]?.sliceSpacingMm).toBe(1);
    expect(stacks[0]?.findings).toEqual([]);
  });

  it('orders oblique slices by their normal', () => {
    const orientation = { tag: 0x00200037, vr: 'DS', value: [0, 1, 0, 0, 0, -1] } as const;
    const at = (x: number, number: number): CtSliceOptions => ({
      number,
      change: {
        [orientation.tag]: orientation,
        2097202: { tag: 0x00200032, vr: 'DS', value: [x, 0, 0] },
      },
    });
    // Normal of (0,1,0)×(0,0,-1) is (-1,0,0): the largest x comes first.
    const { stacks } = stacksOf([at(1, 1), at(3, 2), at(2, 3)]);
    expect(stacks[0]?.slices.map((slice) => slice.alongMm)).toEqual([-3, -2, -1]);
  });

  it('finds missing slices and takes the usual distance as spacing', () => {
    const { stacks } = stacksOf([0, 1, 2, 5, 6].map((z, number) => ({ z, number })));
    expect(stacks[0]?.sliceSpacingMm).toBe(1);
    expect(stacks[0]?.findings).toEqual([
      { code: 'missing-slices', text: 'A gap where about 2 slice(s) are missing.' },
    ]);
  });

  it('splits a series of two phases into two stacks with keys of their own', () => {
    const phase = (percent: number) => ({
      2134593: { tag: 0x00209241, vr: 'FL', value: percent } as const,
    });
    const { stacks } = stacksOf([
      { z: 0, number: 1, change: phase(75) },
      { z: 0, number: 2, change: phase(40) },
      { z: 1, number: 3, change: phase(75) },
      { z: 1, number: 4, change: phase(40) },
    ]);
    expect(
      stacks.map(({ key, slices }) => [
        key,
        slices[0].image.acquisition.phasePercent,
        slices.length,
      ]),
    ).toEqual([
      [`${CORPUS_ROOT}.2.1#1`, 40, 2],
      [`${CORPUS_ROOT}.2.1#2`, 75, 2],
    ]);
  });

  it('never puts two patients into one stack', () => {
    const other = { 1048608: { tag: 0x00100020, vr: 'LO', value: 'C-2' } as const };
    const { stacks } = stacksOf([
      { z: 0, number: 1 },
      { z: 1, number: 2, change: other },
    ]);
    expect(stacks).toHaveLength(2);
  });

  it('leaves out a second copy of an image and names the first', () => {
    const { stacks, leftOut } = buildStacks(
      ['f0', 'f1'].map((file, fileId) => ({
        fileId,
        file,
        image: image({ number: 1 }),
        pixelDigest: 'equal',
      })),
    );
    expect(stacks[0]?.slices).toHaveLength(1);
    expect(leftOut).toEqual([
      { file: 'f1', code: 'duplicate', text: 'The same image as f0: left out.' },
    ]);
  });

  it('measures the tilt of a sheared stack from its positions', () => {
    const at = (z: number, number: number): CtSliceOptions => ({
      number,
      change: { 2097202: { tag: 0x00200032, vr: 'DS', value: [0, z, z] } },
    });
    const { stacks } = stacksOf([at(0, 1), at(1, 2), at(2, 3)]);
    expect(stacks[0]?.findings).toEqual([
      { code: 'tilted', text: 'The stack is sheared by 45.0°, measured from its positions.' },
    ]);
  });
});
