import type { WriteElement } from '../../../core/dicom/write/index.js';
import { ctSlice } from '../ctSlice.js';
import { change, without } from '../element.js';
import { enhancedCt, frameValues } from '../enhancedCt.js';
import { losslessJpeg, type Predictor } from '../losslessJpeg.js';
import { rleFrame } from '../packBits.js';
import type { CorpusRow } from '../row.js';

const PIXEL_DATA = 0x7fe00010;
const RLE = '1.2.840.10008.1.2.5';
const one = (bytes: () => Uint8Array) => () => ({ 'a.dcm': bytes() });
const us = (tag: number, value: number) => ({ tag, vr: 'US', value }) as const;

const fragments = (parts: readonly Uint8Array[], offsetTable?: Uint8Array): WriteElement => ({
  tag: PIXEL_DATA,
  vr: 'OB',
  fragments: parts,
  ...(offsetTable && { offsetTable }),
});

const words = (...values: readonly number[]): Uint8Array =>
  new Uint8Array(Uint32Array.from(values).buffer);

const WORDS = Int16Array.from({ length: 20 }, (_, index) => 1000 + index);
const NOTHING = new Uint8Array(0);
const TWO = [{ z: 0 }, { z: 1 }] as const;
const rleOf = (index: number): Uint8Array => rleFrame(frameValues(index, 20));

const rleSlice = (parts: readonly Uint8Array[], offsetTable?: Uint8Array): Uint8Array =>
  ctSlice({ transferSyntaxUid: RLE, change: change(fragments(parts, offsetTable)) });

const rleFrames = (parts: readonly Uint8Array[], extra: readonly WriteElement[] = []): Uint8Array =>
  enhancedCt({
    frames: TWO,
    transferSyntaxUid: RLE,
    pixelData: fragments(parts),
    change: change(...extra),
  });

/** Padded to an even length, as fragments are (PS3.5 A.4). */
const evenly = (bytes: Uint8Array): Uint8Array =>
  bytes.length % 2 === 0 ? bytes : Uint8Array.of(...bytes, 0);

/** Signed values that need every category of difference, as 4 lines of 5. */
const NOISY = Int16Array.of(
  ...[0, 32767, -32768, 1, -1, 700, 699, -3000, 12, 12],
  ...[-1500, 24000, 23000, 5, 6, 7, 8, -9, 1023, 1024],
);

const TWELVE_BITS = Int16Array.from({ length: 20 }, (_, i) => [5, 0xfff, 0x800, 0x7ff][i % 4] ?? 0);

function jpegSlice(values: Int16Array, predictor: Predictor, precision = 16): Uint8Array {
  const stream = losslessJpeg(new Uint16Array(values.buffer), 5, { predictor, precision });
  return ctSlice({
    transferSyntaxUid: '1.2.840.10008.1.2.4.57',
    change: change(fragments([evenly(stream)]), {
      tag: 0x00281052,
      vr: 'DS',
      value: 40000,
    }),
  });
}

/** Rows 64 to 81: frames, fragments, compressed pixels, and pixels that are no slice. */
export const FRAMES_AND_FRAGMENTS: readonly CorpusRow[] = [
  {
    row: 64,
    section: 'D',
    title: 'Enhanced multi-frame CT',
    outcome: 'Read from shared and own groups of each frame, in whatever order the frames stand.',
    cases: [
      {
        name: 'frames out of order, each with its own rescale',
        verdict: 'READ',
        build: one(() =>
          enhancedCt({
            frames: [
              { z: 2, slope: 1, intercept: -1024, phasePercent: 75 },
              { z: 0, slope: 2, intercept: -4096, phasePercent: 75, kernel: 'Crisp' },
              { z: 1, slope: 1, intercept: 0, phasePercent: 75 },
            ].map((frame) => ({ kernel: 'Crisp', ...frame })),
          }),
        ),
        image: {
          frame: 1,
          acquisition: { phasePercent: 75, kernelLabel: 'Crisp', kvp: 100, thicknessMm: 0.6 },
          pixels: { rescale: { slope: 2, intercept: -4096 }, unit: 'HU' },
        },
        stored: [2000, 2001],
      },
      {
        name: 'a localizer among the frames',
        verdict: 'SKIP',
        code: 'localizer',
        image: {},
        build: one(() => enhancedCt({ frames: [{ z: 0 }, { z: 9, type: 'LOCALIZER' }, { z: 1 }] })),
      },
    ],
  },
  {
    row: 65,
    section: 'D',
    title: 'Number of Frames zero, empty, or not what the data hold',
    outcome:
      'Zero and empty are read as one; frames beyond the number are not read, missing ones are left out.',
    cases: [
      ...(['0', ''] as const).map((value) => ({
        name: `“${value}” in a single image`,
        verdict: 'READ+' as const,
        code: 'frames-not-stated',
        build: one(() => ctSlice({ change: change({ tag: 0x00280008, vr: 'IS', value }) })),
        stored: [1000, 1001],
      })),
      {
        name: 'empty in a multi-frame image',
        verdict: 'READ+',
        code: 'frames-not-stated',
        build: one(() =>
          enhancedCt({
            frames: [{ z: 0 }],
            change: change({ tag: 0x00280008, vr: 'IS', value: '' }),
          }),
        ),
      },
      {
        name: 'more data than frames',
        verdict: 'READ+',
        code: 'more-frames',
        build: one(() => ctSlice({ stored: new Int16Array(60).fill(7) })),
        stored: [7, 7],
      },
      {
        name: 'fewer data than frames',
        verdict: 'REFUSE',
        code: 'frame-missing',
        build: one(() =>
          enhancedCt({
            frames: TWO,
            pixelData: { tag: PIXEL_DATA, vr: 'OW', value: frameValues(0, 20) },
          }),
        ),
        stored: [1000, 1001],
      },
      {
        name: 'fewer functional groups than frames',
        verdict: 'REFUSE',
        code: 'frame-missing',
        build: one(() =>
          enhancedCt({
            frames: TWO,
            change: change({ tag: 0x00280008, vr: 'IS', value: 3 }),
            pixelData: { tag: PIXEL_DATA, vr: 'OW', value: new Int16Array(60) },
          }),
        ),
      },
    ] as unknown as CorpusRow['cases'],
  },
  {
    row: 66,
    section: 'D',
    title: 'Compressed, with an empty offset table',
    outcome: 'Read.',
    cases: [
      {
        name: 'one image',
        verdict: 'READ',
        build: one(() => rleSlice([rleFrame(WORDS)])),
        stored: [1000, 1001],
      },
      {
        name: 'two frames',
        verdict: 'READ',
        build: one(() => rleFrames([rleOf(0), rleOf(1)])),
        stored: [1000, 1001],
      },
    ],
  },
  {
    row: 67,
    section: 'D',
    title: 'One frame in several fragments',
    outcome: 'Read; of one image all are joined, several frames are split at their end marks.',
    cases: [
      {
        name: 'one image in three fragments',
        verdict: 'READ',
        build: one(() => {
          const whole = rleFrame(WORDS);
          return rleSlice([whole.subarray(0, 20), whole.subarray(20, 70), whole.subarray(70)]);
        }),
        stored: [1000, 1001],
      },
      {
        name: 'two frames in several fragments, told apart by their end marks',
        verdict: 'READ',
        build: one(() => {
          const [first, second] = [0, 1].map((index) =>
            evenly(
              losslessJpeg(new Uint16Array(frameValues(index, 20).buffer), 5, { predictor: 4 }),
            ),
          );
          if (first === undefined || second === undefined) throw new RangeError('no frames');
          return enhancedCt({
            frames: [{ z: 1 }, { z: 0 }],
            transferSyntaxUid: '1.2.840.10008.1.2.4.57',
            pixelData: fragments([
              first.subarray(0, 30),
              first.subarray(30, 60),
              first.subarray(60),
              second.subarray(0, 90),
              second.subarray(90),
            ]),
          });
        }),
        stored: [2000, 2001],
      },
    ],
  },
  {
    row: 68,
    section: 'D',
    title: 'Empty last fragment, offset table of zeros, extended offset table',
    outcome: 'Read.',
    cases: [
      {
        name: 'an empty last fragment',
        verdict: 'READ',
        build: one(() => rleSlice([rleFrame(WORDS), NOTHING])),
        stored: [1000, 1001],
      },
      {
        name: 'a table of four zero bytes',
        verdict: 'READ',
        build: one(() => rleSlice([rleFrame(WORDS)], words(0))),
        stored: [1000, 1001],
      },
      {
        name: 'an extended offset table and a frame in two fragments',
        verdict: 'READ',
        build: one(() => {
          const first = rleOf(0);
          const second = rleOf(1);
          const split = 40;
          return rleFrames(
            [first.subarray(0, split), first.subarray(split), second],
            [
              { tag: 0x7fe00001, vr: 'OV', value: words(0, 0, first.length + 16, 0) },
              { tag: 0x7fe00002, vr: 'OV', value: words(first.length, 0, second.length, 0) },
            ],
          );
        }),
        stored: [1000, 1001],
      },
    ],
  },
  {
    row: 69,
    section: 'D',
    title: 'A compressed transfer syntax but native pixels',
    outcome: 'Read when their length is that of the native image; otherwise left out.',
    cases: [
      {
        name: 'native pixels',
        verdict: 'READ+',
        code: 'native-pixels',
        build: one(() => ctSlice({ transferSyntaxUid: '1.2.840.10008.1.2.4.90' })),
        stored: [1000, 1001],
      },
      {
        name: 'another length',
        verdict: 'REFUSE',
        code: 'bad-pixel-data',
        build: one(() =>
          ctSlice({
            transferSyntaxUid: '1.2.840.10008.1.2.4.90',
            stored: new Int16Array(15),
          }),
        ),
      },
    ],
  },
  {
    row: 70,
    section: 'D',
    title: 'Pixel Data shorter than needed',
    outcome: 'The slice is left out and stays a gap; nothing is filled up.',
    cases: [
      {
        name: 'it says so',
        verdict: 'REFUSE',
        code: 'short-pixel-data',
        build: one(() => ctSlice({ stored: new Int16Array(19) })),
      },
      {
        name: 'the file ends early',
        verdict: 'REFUSE',
        code: 'cut-pixels',
        build: one(() => ctSlice().subarray(0, -2)),
      },
      {
        name: 'compressed, and the file ends early',
        verdict: 'REFUSE',
        code: 'cut-pixels',
        build: one(() => rleSlice([rleFrame(WORDS)]).subarray(0, -16)),
      },
      {
        name: 'a gap where the middle slice of three is cut',
        verdict: 'REFUSE',
        code: 'missing-slices',
        build: () => ({
          ...Object.fromEntries([0, 1, 3, 4].map((z) => [`${z}.dcm`, ctSlice({ z, number: z })])),
          '2.dcm': ctSlice({ z: 2, number: 2 }).subarray(0, -2),
        }),
      },
    ],
  },
  {
    row: 71,
    section: 'D',
    title: 'Excess padding behind the pixels',
    outcome: 'Read.',
    cases: [
      {
        name: 'six bytes more',
        verdict: 'READ',
        build: one(() => ctSlice({ stored: Int16Array.from({ length: 23 }, (_, i) => 1000 + i) })),
        stored: [1000, 1001],
      },
    ],
  },
  {
    row: 72,
    section: 'D',
    title: 'A compression that can’t be decoded',
    outcome: 'Left out, by name and UID.',
    cases: [
      '1.2.840.10008.1.2.4.50',
      '1.2.840.10008.1.2.4.110',
      '1.2.840.10008.1.2.4.102',
      '1.2.840.10008.1.2.4.94',
    ].map((transferSyntaxUid) => ({
      name: transferSyntaxUid,
      verdict: 'REFUSE' as const,
      code: 'unsupported-transfer-syntax',
      build: one(() =>
        ctSlice({ transferSyntaxUid, change: change(fragments([new Uint8Array(64)])) }),
      ),
    })) as unknown as CorpusRow['cases'],
  },
  {
    row: 73,
    section: 'D',
    title: 'JPEG with loss, 12 bit',
    outcome: 'Left out: no decoder for 12 bits is at hand, and one for 8 bits would be wrong.',
    cases: [
      {
        name: '1.2.840.10008.1.2.4.51',
        verdict: 'REFUSE',
        code: 'unsupported-transfer-syntax',
        build: one(() =>
          ctSlice({
            transferSyntaxUid: '1.2.840.10008.1.2.4.51',
            change: change(fragments([new Uint8Array(64)])),
          }),
        ),
      },
    ],
  },
  {
    row: 74,
    section: 'D',
    title: 'Compression with loss, now or earlier',
    outcome: 'Read; the mark stands at every number.',
    cases: [
      {
        name: 'Lossy Image Compression 01',
        verdict: 'READ+',
        code: 'lossy',
        build: one(() => ctSlice({ change: change({ tag: 0x00282110, vr: 'CS', value: '01' }) })),
        image: { acquisition: { lossy: true } },
      },
    ],
  },
  {
    row: 75,
    section: 'D',
    title: 'JPEG lossless of 16 bits, predictors other than 1',
    outcome: 'Read.',
    cases: ([1, 2, 3, 4, 5, 6, 7] as const).map((predictor) => ({
      name: `predictor ${predictor}`,
      verdict: 'READ' as const,
      build: one(() => jpegSlice(NOISY, predictor)),
      stored: [...NOISY],
    })) as unknown as CorpusRow['cases'],
  },
  {
    row: 76,
    section: 'D',
    title: 'Sign or precision of the code stream ≠ the tags',
    outcome: 'Read as the code stream has it, with a finding.',
    cases: [
      {
        name: 'a stream of 12 bits under a header of 16, signed',
        verdict: 'READ+',
        code: 'code-stream-differs',
        build: one(() => jpegSlice(TWELVE_BITS, 1, 12)),
        image: { pixels: { bitsStored: 12, highBit: 11, signed: true } },
        stored: [5, -1, -2048, 2047],
      },
    ],
  },
  {
    row: 77,
    section: 'D',
    title: 'RLE segments that are padded or short',
    outcome: 'Padding is dropped; a short segment leaves the slice out.',
    cases: [
      {
        name: 'padded',
        verdict: 'READ',
        build: one(() => rleSlice([rleFrame(WORDS, 3)])),
        stored: [1000, 1001],
      },
      {
        name: 'of odd length',
        verdict: 'READ',
        build: one(() => rleSlice([rleFrame(WORDS, 1)])),
        stored: [1000, 1001],
      },
      {
        name: 'short',
        verdict: 'REFUSE',
        code: 'cut-pixels',
        build: one(() => rleSlice([rleFrame(WORDS.subarray(0, 18))])),
      },
    ],
  },
  {
    row: 78,
    section: 'D',
    title: '65535 × 65535',
    outcome: 'Left out before room is made for it.',
    cases: [
      {
        name: 'native',
        verdict: 'REFUSE',
        code: 'too-large',
        build: one(() => ctSlice({ change: change(us(0x00280010, 65535), us(0x00280011, 65535)) })),
      },
      {
        name: 'compressed, 16384 × 16384 in a few bytes',
        verdict: 'REFUSE',
        code: 'cut-pixels',
        build: one(() =>
          ctSlice({
            transferSyntaxUid: RLE,
            change: change(
              us(0x00280010, 16384),
              us(0x00280011, 16384),
              fragments([rleFrame(WORDS)]),
            ),
          }),
        ),
      },
    ],
  },
  {
    row: 79,
    section: 'D',
    title: 'No Pixel Data, or Rows or Columns zero',
    outcome: 'Left out: no image.',
    cases: [
      {
        name: 'no Pixel Data',
        verdict: 'SKIP',
        code: 'no-image',
        build: one(() => ctSlice({ change: without(PIXEL_DATA) })),
      },
      {
        name: 'Rows zero',
        verdict: 'SKIP',
        code: 'no-image',
        build: one(() => ctSlice({ change: change(us(0x00280010, 0)) })),
      },
    ],
  },
  {
    row: 80,
    section: 'D',
    title: 'Colour or 8 bit, even when tagged as CT',
    outcome: 'Left out: not a CT slice.',
    cases: [
      {
        name: 'RGB',
        verdict: 'SKIP',
        code: 'not-a-ct-slice',
        build: one(() =>
          ctSlice({
            change: change(us(0x00280002, 3), us(0x00280100, 8), {
              tag: 0x00280004,
              vr: 'CS',
              value: 'RGB',
            }),
          }),
        ),
      },
      {
        name: '8 bit grey',
        verdict: 'SKIP',
        code: 'not-a-ct-slice',
        build: one(() =>
          ctSlice({ change: change(us(0x00280100, 8), us(0x00280101, 8), us(0x00280102, 7)) }),
        ),
      },
    ],
  },
  {
    row: 81,
    section: 'D',
    title: 'Floating-point Pixel Data',
    outcome: 'Left out.',
    cases: [
      ...(
        [
          ['single', 0x7fe00008, 'OF'],
          ['double', 0x7fe00009, 'OD'],
        ] as const
      ).map(([name, tag, vr]) => ({
        name,
        verdict: 'REFUSE' as const,
        code: 'float-pixels',
        build: one(() =>
          ctSlice({
            change: {
              ...without(PIXEL_DATA),
              ...change({ tag, vr, value: new Uint8Array(160) }),
            },
          }),
        ),
      })),
    ] as unknown as CorpusRow['cases'],
  },
];
