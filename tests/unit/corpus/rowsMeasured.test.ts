import { describe, expect, it } from 'vitest';
import { readHeader } from '../../../core/dicom/index.js';
import type { WriteElement } from '../../../core/dicom/write/index.js';
import { displayTable, NO_DATA_GREY } from '../../../core/intensity/index.js';
import { measureRegion, type RegionValue } from '../../../core/region/index.js';
import { buildStacks } from '../../../core/stack/index.js';
import { type CtSliceOptions, ctSlice } from '../../corpus/ctSlice.js';
import { change, without } from '../../corpus/element.js';
import { enhancedCt } from '../../corpus/enhancedCt.js';
import { readCorpusFolder } from '../../corpus/readCorpusFolder.js';

/** All pixels of the corpus slice: 4 rows of 0.5 mm, 5 columns of 0.25 mm. */
const ALL = (z: number) =>
  ({ kind: 'ellipse', centreMm: [-9.5, -19.25, z], radiiMm: [3, 3] }) as const;

function measured(slices: readonly CtSliceOptions[], z: number): RegionValue {
  const files = slices.map((options, fileId) => {
    const bytes = ctSlice({ number: fileId + 1, ...options });
    const reading = readHeader(bytes, bytes.length);
    if (reading.kind !== 'image') throw new Error(reading.kind);
    return { fileId, file: `${fileId}`, image: reading.images[0] };
  });
  const [stack] = buildStacks(files).stacks;
  if (stack === undefined) throw new Error('no stack');
  return measureRegion(
    ALL(z),
    stack,
    (index) => slices[stack.slices[index]?.fileId ?? -1]?.stored ?? undefined,
  );
}

const codes = ({ flags }: RegionValue) => flags.map(({ code }) => code);
const padded = (low: number) => Int16Array.from({ length: 20 }, (_, i) => (i < 8 ? low : 1100));
const ds = (tag: number, value: number): WriteElement => ({ tag, vr: 'DS', value });

describe('what a measurement makes of awkward pixels', () => {
  it('54: padding is in no statistics, and is drawn as no data', () => {
    const padding: WriteElement = { tag: 0x00280120, vr: 'SS', value: -2000 };
    const value = measured([{ stored: padded(-2000), change: change(padding) }], 0);
    expect([value.n, value.meanHu, value.sdHu, value.minHu]).toEqual([12, 76, 0, 76]);
    expect(codes(value)).toContain('padding-inside');
    const bytes = ctSlice({ change: change(padding) });
    const reading = readHeader(bytes, bytes.length);
    if (reading.kind !== 'image') throw new Error(reading.kind);
    const window = { centre: 40, width: 400, function: 'LINEAR' } as const;
    const table = displayTable(reading.images[0].pixels, window);
    expect(table[-2000 & 0xffff]).toBe(NO_DATA_GREY);
    expect(table[-1999 & 0xffff]).toBe(0);
  });

  it('55: padding without its tag stays in the numbers, and each of them says so', () => {
    const value = measured([{ stored: padded(-2000) }], 0);
    expect([value.n, value.minHu]).toEqual([20, -3024]);
    expect(codes(value)).toContain('unmarked-padding');
  });

  it('60: each slice is measured with its own slope and intercept', () => {
    const stored = new Int16Array(20).fill(1100);
    const slices = [
      { z: 0, stored },
      { z: 1, stored, change: change(ds(0x00281053, 2), ds(0x00281052, -2000)) },
    ];
    expect(measured(slices, 0).meanHu).toBe(76);
    expect(measured(slices, 1).meanHu).toBe(200);
  });

  it.each([
    ['57: without a slope', without(0x00281053)],
    ['58: in another unit', change({ tag: 0x00281054, vr: 'LO', value: 'EDW' })],
    ['59: with slope 0', change(ds(0x00281053, 0))],
  ])('%s nothing is measured', (_, what) => {
    const value = measured([{ stored: padded(900), change: what }], 0);
    expect([value.n, value.meanHu]).toEqual([0, null]);
    expect(codes(value)).toContain('not-hu');
  });

  it('74: a value of a lossy image carries the mark', () => {
    const lossy: WriteElement = { tag: 0x00282110, vr: 'CS', value: '01' };
    expect(codes(measured([{ stored: padded(1000), change: change(lossy) }], 0))).toContain(
      'lossy',
    );
  });

  it('64: a value of a frame names it, counted from 1', () => {
    const bytes = enhancedCt({ frames: [{ z: 1 }, { z: 0 }] });
    const reading = readHeader(bytes, bytes.length);
    if (reading.kind !== 'image') throw new Error(reading.kind);
    const files = reading.images.map((image) => ({ fileId: 0, file: 'a', image }));
    const [stack] = buildStacks(files).stacks;
    if (stack === undefined) throw new Error('no stack');
    const value = measureRegion(ALL(0), stack, () => new Int16Array(20));
    expect([value.sliceIndex, value.frameNumber]).toEqual([0, 2]);
    expect(measured([{ stored: padded(0) }], 0).frameNumber).toBeNull();
  });
});

describe('88: slices without UIDs', () => {
  const bare = without(0x00080018, 0x0020000d, 0x0020000e);
  const slices = (folder: string) =>
    Object.fromEntries([0, 1, 2].map((z) => [`${folder}/${z}.dcm`, ctSlice({ z, change: bare })]));

  it('are one stack a folder, with UIDs that stay the same when the folder moves', async () => {
    const one = await readCorpusFolder({ build: () => ({ ...slices('a'), ...slices('b') }) });
    expect(one.index.stacks.map((stack) => stack.slices.length)).toEqual([3, 3]);
    const moved = await readCorpusFolder({ build: () => slices('elsewhere/a') });
    const seriesOf = ({ index }: typeof one) => {
      const slices = index.stacks.flatMap((stack) => stack.slices);
      const inA = slices.find(({ file }) => /(^|\/)a\//.test(file));
      return inA?.image.acquisition.seriesInstanceUid;
    };
    expect(seriesOf(moved)).toMatch(/^2\.25\.\d+$/);
    expect(seriesOf(moved)).toBe(seriesOf(one));
    const uids = one.index.stacks.flatMap((stack) =>
      stack.slices.map(({ image }) => image.sopInstanceUid),
    );
    expect(new Set(uids).size).toBe(6);
  });
});
