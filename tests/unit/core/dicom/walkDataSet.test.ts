import { describe, expect, it } from 'vitest';
import { parseDataSet } from '../../../../core/dicom/parseDataSet.js';
import { walkDataSet } from '../../../../core/dicom/walkDataSet.js';
import type { WriteElement } from '../../../../core/dicom/write/index.js';
import { ctSlice } from '../../../corpus/ctSlice.js';

// The outside judge is dicom-parser: what is walked must be what it parses, on whole, cut and broken files.

const IMPLICIT = '1.2.840.10008.1.2';
const EXPLICIT = '1.2.840.10008.1.2.1';

const inner: readonly WriteElement[] = [
  { tag: 0x00081150, vr: 'UI', value: '1.2.840.10008.3.1.2.3.1' },
  { tag: 0x00081155, vr: 'UI', value: '2.25.5' },
];

/** A slice with sequences in sequences, closed by delimiters or by lengths, an empty one, and private elements. */
function slice(transferSyntaxUid: string, undefinedLength: boolean): Uint8Array {
  const nested: WriteElement = {
    tag: 0x00081140,
    vr: 'SQ',
    items: [inner, [...inner, { tag: 0x00089215, vr: 'SQ', items: [inner], undefinedLength }]],
    undefinedLength,
  };
  const empty: WriteElement = { tag: 0x00089124, vr: 'SQ', items: [], undefinedLength };
  const creator: WriteElement = { tag: 0x00190010, vr: 'LO', value: 'CORPUS' };
  const secret: WriteElement = { tag: 0x00191001, vr: 'UN', value: Uint8Array.of(1, 2, 3, 4) };
  const change = Object.fromEntries([nested, empty, creator, secret].map((e) => [e.tag, e]));
  return ctSlice({ transferSyntaxUid, change });
}

const FILES = [
  ['explicit, by delimiters', slice(EXPLICIT, true)],
  ['explicit, by lengths', slice(EXPLICIT, false)],
  ['implicit, by delimiters', slice(IMPLICIT, true)],
  ['implicit, by lengths', slice(IMPLICIT, false)],
] as const;

const TAGS = Array.from(
  new Set([
    ...[0x00020000, 0x00020001, 0x00020010, 0x00080005, 0x00080008, 0x00080016, 0x00080018],
    ...[0x00081140, 0x00089124, 0x00100010, 0x00181210, 0x00190010, 0x00191001, 0x0020000d],
    ...[0x00200032, 0x00200037, 0x00280010, 0x00280103, 0x00281053, 0x7fe00010, 0x7fe00011],
  ]),
  (tag) => `x${tag.toString(16).padStart(8, '0')}`,
);

type Read = NonNullable<ReturnType<typeof walkDataSet>>;

function summary({ find, items, transferSyntaxUid, littleEndian, pixelData, findings }: Read) {
  const places = TAGS.map((tag) => [tag, find(tag)]);
  const inItems = items('x00081140')?.map((item) => item.find('x00081155'));
  return { places, inItems, transferSyntaxUid, littleEndian, pixelData, findings };
}

describe('Walking through a header', () => {
  it.each(FILES)('finds what the parser finds: %s', (_name, bytes) => {
    const walked = walkDataSet(bytes);
    const parsed = parseDataSet(bytes);
    if (walked === undefined || !parsed.ok) throw new Error('not read');
    expect(summary(walked)).toEqual(summary(parsed.value));
    expect(walked.items('x00081140')).toHaveLength(2);
    expect(walked.items('x00280010')).toBeUndefined();
  });

  it.each(FILES)('has no answer to a header that ends too early: %s', (_name, bytes) => {
    const head = walkDataSet(bytes)?.pixelData?.offset ?? 0;
    for (let length = 0; length < head; length++) {
      expect(walkDataSet(bytes.subarray(0, length)), `${length} bytes`).toBeUndefined();
    }
    expect(walkDataSet(bytes.subarray(0, head))?.pixelData?.offset).toBe(head);
  });

  it.each(FILES)('says of a broken header nothing but what the parser says: %s', (_name, bytes) => {
    const head = walkDataSet(bytes)?.pixelData?.offset ?? 0;
    let both = 0;
    for (let at = 132; at < head; at++) {
      for (const value of [0x00, 0x53, 0xe0, 0xff]) {
        const broken = bytes.slice();
        broken[at] = value;
        const walked = walkDataSet(broken);
        if (walked === undefined) continue;
        const parsed = parseDataSet(broken);
        if (!parsed.ok) throw new Error(`walked, not parsed: byte ${at} as ${value}`);
        expect(summary(walked), `byte ${at} as ${value}`).toEqual(summary(parsed.value));
        both++;
      }
    }
    expect(both).toBeGreaterThan(1000);
  });

  it('leaves big endian, deflated and unordered files to the parser', () => {
    const big = ctSlice({ transferSyntaxUid: '1.2.840.10008.1.2.2' });
    const deflate = (dataSet: Uint8Array): Uint8Array => dataSet;
    const deflated = ctSlice({ transferSyntaxUid: '1.2.840.10008.1.2.1.99', deflate });
    const [first] = FILES;
    const head = walkDataSet(first[1])?.pixelData?.offset ?? 0;
    // The head of Pixel Data is 12 bytes: another data set begins where it began.
    const twice = Uint8Array.from([...first[1].subarray(0, head - 12), ...first[1].subarray(132)]);
    expect([big, deflated, twice].map((bytes) => walkDataSet(bytes) === undefined)).toEqual([
      true,
      true,
      true,
    ]);
  });
});
