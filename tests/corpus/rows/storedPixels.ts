import type { WriteElement } from '../../../core/dicom/write/index.js';
import { ctSlice } from '../ctSlice.js';
import { change, without } from '../element.js';
import type { CorpusRow } from '../row.js';

const us = (tag: number, value: number) => ({ tag, vr: 'US', value }) as const;
const ds = (tag: number, value: number | string | readonly (number | string)[]) =>
  ({ tag, vr: 'DS', value }) as const;
const BITS_12 = [us(0x00280101, 12), us(0x00280102, 11)] as const;
const SLOPE = 0x00281053;
const INTERCEPT = 0x00281052;
const TYPE = 0x00281054;

const one = (options: Parameters<typeof ctSlice>[0]) => () => ({ 'a.dcm': ctSlice(options) });

/** A VOI LUT Sequence of one table (PS3.3 C.11.2.1.1). */
function voiLut(
  descriptor: readonly number[],
  data: readonly number[],
  explanation?: string,
): WriteElement {
  return {
    tag: 0x00283010,
    vr: 'SQ',
    items: [
      [
        { tag: 0x00283002, vr: 'US', value: descriptor },
        ...(explanation === undefined
          ? []
          : [{ tag: 0x00283003, vr: 'LO', value: explanation } as const]),
        { tag: 0x00283006, vr: 'US', value: data },
      ],
    ],
  };
}

/** Rows 51 to 63: stored bits and what they mean. */
export const STORED_PIXELS: readonly CorpusRow[] = [
  {
    row: 51,
    section: 'D',
    title: '12 bits stored of 16, dirty high bits or an old overlay in them',
    outcome: 'Read; the other bits are dropped, then the sign is extended.',
    cases: [
      {
        name: 'signed',
        verdict: 'READ',
        build: one({
          rows: 1,
          columns: 4,
          stored: Uint16Array.of(0x5fff, 0x3800, 0xf7ff, 0x8001),
          change: change(...BITS_12, ds(INTERCEPT, 1024)),
        }),
        stored: [-1, -2048, 2047, 1],
      },
      {
        name: 'unsigned',
        verdict: 'READ',
        build: one({
          rows: 1,
          columns: 2,
          signed: false,
          stored: Uint16Array.of(0x5fff, 0x3800),
          change: change(...BITS_12),
        }),
        stored: [4095, 2048],
      },
    ],
  },
  {
    row: 52,
    section: 'D',
    title: 'High Bit ≠ Bits Stored − 1',
    outcome: 'Read; the stored bits are shifted down.',
    cases: [
      {
        name: 'twelve bits at the top',
        verdict: 'READ',
        build: one({
          rows: 1,
          columns: 2,
          stored: Uint16Array.of(0xfff0, 0x7ff5),
          change: change(us(0x00280101, 12), us(0x00280102, 15)),
        }),
        stored: [-1, 2047],
      },
      {
        name: 'more bits than fit below the high bit',
        verdict: 'REFUSE',
        code: 'bad-pixel-encoding',
        build: one({ change: change(us(0x00280101, 12), us(0x00280102, 7)) }),
      },
    ],
  },
  {
    row: 53,
    section: 'D',
    title: 'Signed and unsigned, same bytes',
    outcome: 'Read by Pixel Representation alone.',
    cases: [
      {
        name: 'signed',
        verdict: 'READ',
        build: one({
          rows: 1,
          columns: 1,
          stored: Uint16Array.of(0xf830),
          change: change(ds(INTERCEPT, 1024)),
        }),
        stored: [-2000],
        image: { pixels: { signed: true } },
      },
      {
        name: 'unsigned',
        verdict: 'READ',
        build: one({ rows: 1, columns: 1, signed: false, stored: Uint16Array.of(0xf830) }),
        stored: [63536],
        image: { pixels: { signed: false } },
      },
    ],
  },
  {
    row: 54,
    section: 'D',
    title: 'Pixel Padding Value and Range Limit',
    outcome: 'Read; padding is in no statistics and is drawn as no data.',
    cases: [
      {
        name: 'a value',
        verdict: 'READ',
        build: one({
          rows: 1,
          columns: 2,
          stored: Int16Array.of(-2000, 5),
          change: change({ tag: 0x00280120, vr: 'SS', value: -2000 }),
        }),
        image: { pixels: { padding: { low: -2000, high: -2000 } } },
        stored: [-2000, 5],
      },
      {
        name: 'a range, its ends the other way round',
        verdict: 'READ',
        build: one({
          rows: 1,
          columns: 2,
          stored: Int16Array.of(-1990, 5),
          change: change(
            { tag: 0x00280120, vr: 'SS', value: -1500 },
            { tag: 0x00280121, vr: 'SS', value: -2000 },
          ),
        }),
        image: { pixels: { padding: { low: -2000, high: -1500 } } },
      },
    ],
  },
  {
    row: 55,
    section: 'D',
    title: 'Padding values without the tag (−2000, −3024 outside the circle)',
    outcome:
      'Read, nothing taken away by itself; a flag on each region that holds them. The reader can leave them out of both stacks; the note then says so and is measured so again.',
    cases: [
      {
        name: '−3024 HU',
        verdict: 'READ+',
        code: 'unmarked-padding',
        build: one({ rows: 1, columns: 2, stored: Int16Array.of(-2000, 1024) }),
        stored: [-2000, 1024],
      },
      {
        name: '−2000 HU',
        verdict: 'READ+',
        code: 'unmarked-padding',
        build: one({
          rows: 1,
          columns: 2,
          stored: Int16Array.of(-2000, 24),
          change: change(ds(INTERCEPT, 0)),
        }),
        stored: [-2000, 24],
      },
    ],
  },
  {
    row: 56,
    section: 'D',
    title: 'MONOCHROME1',
    outcome: 'Read; inverted on the screen only.',
    cases: [
      {
        name: 'MONOCHROME1',
        verdict: 'READ',
        build: one({ change: change({ tag: 0x00280004, vr: 'CS', value: 'MONOCHROME1' }) }),
        image: { pixels: { photometric: 'MONOCHROME1', rescale: { slope: 1, intercept: -1024 } } },
        stored: [1000, 1001],
      },
    ],
  },
  {
    row: 57,
    section: 'D',
    title: 'Rescale slope or intercept missing',
    outcome: 'Shown as stored values; nothing is measured.',
    cases: [
      {
        name: 'no slope',
        verdict: 'READ+',
        code: 'no-rescale',
        build: one({ change: without(SLOPE) }),
        image: { pixels: { unit: 'stored' } },
      },
      {
        name: 'no intercept',
        verdict: 'READ+',
        code: 'no-rescale',
        build: one({ change: without(INTERCEPT) }),
        image: { pixels: { unit: 'stored' } },
      },
    ],
  },
  {
    row: 58,
    section: 'D',
    title: 'Rescale Type present and not HU',
    outcome: 'Shown in the unit that the file gives; HU windows are off and nothing is measured.',
    cases: [
      {
        name: 'electron density',
        verdict: 'READ+',
        code: 'not-hu',
        build: one({ change: change({ tag: TYPE, vr: 'LO', value: 'EDW' }) }),
        image: { pixels: { unit: 'EDW', rescale: { slope: 1, intercept: -1024 } } },
      },
      {
        name: 'HU, said',
        verdict: 'READ',
        build: one({ change: change({ tag: TYPE, vr: 'LO', value: 'HU' }) }),
        image: { pixels: { unit: 'HU' } },
      },
    ],
  },
  {
    row: 59,
    section: 'D',
    title: 'Slope zero or no number',
    outcome: 'Shown as stored values; nothing is measured.',
    cases: (['0', 'NaN', 'Inf', '1e999'] as const).map((slope) => ({
      name: `slope ${slope}`,
      verdict: 'REFUSE' as const,
      code: 'bad-rescale',
      build: one({ change: change(ds(SLOPE, slope)) }),
      image: { pixels: { unit: 'stored' } },
    })) as unknown as CorpusRow['cases'],
  },
  {
    row: 60,
    section: 'D',
    title: 'Slope and intercept differ from slice to slice',
    outcome: 'Read; each slice has its own.',
    cases: [
      {
        name: 'two slices',
        verdict: 'READ',
        build: () => ({
          'a.dcm': ctSlice({ z: 0, number: 1, change: change(ds(SLOPE, 2), ds(INTERCEPT, -2048)) }),
          'b.dcm': ctSlice({ z: 1, number: 2 }),
        }),
        image: { pixels: { rescale: { slope: 2, intercept: -2048 } } },
      },
    ],
  },
  {
    row: 61,
    section: 'D',
    title: 'Modality LUT Sequence in place of a rescale',
    outcome: 'Shown through its table; nothing is measured in HU.',
    cases: [
      {
        name: 'with a table',
        verdict: 'REFUSE',
        code: 'modality-lut',
        build: one({
          change: {
            ...without(SLOPE, INTERCEPT),
            ...change({
              tag: 0x00283000,
              vr: 'SQ',
              items: [
                [
                  { tag: 0x00283002, vr: 'US', value: [2, 0, 16] },
                  { tag: 0x00283004, vr: 'LO', value: 'HU' },
                  { tag: 0x00283006, vr: 'US', value: [0, 1] },
                ],
              ],
            }),
          },
        }),
        image: { pixels: { unit: 'stored', modalityLut: { firstStored: 0, values: [0, 1] } } },
      },
      {
        name: 'with an empty descriptor',
        verdict: 'REFUSE',
        code: 'modality-lut',
        build: one({
          change: change({
            tag: 0x00283000,
            vr: 'SQ',
            items: [[{ tag: 0x00283002, vr: 'US', value: [] }]],
          }),
        }),
        image: { pixels: { unit: 'stored' } },
      },
    ],
  },
  {
    row: 62,
    section: 'D',
    title: 'Several windows',
    outcome: 'Read as a list; the first is what the image opens with.',
    cases: [
      {
        name: 'two, with names',
        verdict: 'READ',
        build: one({
          change: change(ds(0x00281050, [40, -600]), ds(0x00281051, [400, 1500]), {
            tag: 0x00281055,
            vr: 'LO',
            value: ['SOFT', 'LUNG'],
          }),
        }),
        image: {
          windows: [
            { centre: 40, width: 400, function: 'LINEAR', explanation: 'SOFT' },
            { centre: -600, width: 1500, function: 'LINEAR', explanation: 'LUNG' },
          ],
        },
      },
    ],
  },
  {
    row: 63,
    section: 'D',
    title: 'Window widths and functions of all kinds',
    outcome:
      'Read as the function says; lookup tables are among the windows of the file. A window that its function does not allow, or a table that is none, is left out, with a finding.',
    cases: [
      ...(['0', '-5', '0.5'] as const).map((width) => ({
        name: `LINEAR with width ${width}`,
        verdict: 'READ+' as const,
        code: 'bad-window',
        build: one({ change: change(ds(0x00281050, 40), ds(0x00281051, width)) }),
        image: { windows: [] },
      })),
      {
        name: 'LINEAR_EXACT with a width of 0.5',
        verdict: 'READ',
        build: one({
          change: change(ds(0x00281050, '0.25'), ds(0x00281051, '0.5'), {
            tag: 0x00281056,
            vr: 'CS',
            value: 'LINEAR_EXACT',
          }),
        }),
        image: { windows: [{ centre: 0.25, width: 0.5, function: 'LINEAR_EXACT' }] },
      },
      {
        name: 'SIGMOID',
        verdict: 'READ',
        build: one({
          change: change(ds(0x00281050, 40), ds(0x00281051, 400), {
            tag: 0x00281056,
            vr: 'CS',
            value: 'SIGMOID',
          }),
        }),
        image: { windows: [{ centre: 40, width: 400, function: 'SIGMOID' }] },
      },
      {
        name: 'an empty function',
        verdict: 'READ',
        build: one({
          change: change(ds(0x00281050, 40), ds(0x00281051, 400), {
            tag: 0x00281056,
            vr: 'CS',
            value: '',
          }),
        }),
        image: { windows: [{ centre: 40, width: 400, function: 'LINEAR' }] },
      },
      {
        name: 'an unknown function',
        verdict: 'READ+',
        code: 'unknown-window-function',
        build: one({
          change: change(ds(0x00281050, 40), ds(0x00281051, 400), {
            tag: 0x00281056,
            vr: 'CS',
            value: 'CUBIC',
          }),
        }),
        image: { windows: [{ centre: 40, width: 400, function: 'LINEAR' }] },
      },
      {
        name: 'a VOI LUT and no window',
        verdict: 'READ',
        build: one({ change: change(voiLut([4, 0xfc18, 8], [0, 51, 51, 255], 'NARROW')) }),
        image: {
          windows: [
            {
              centre: -998,
              width: 4,
              function: 'LINEAR',
              explanation: 'NARROW',
              // 0xFC18 is −1000: HU are signed (PS3.3 C.11.2.1.1).
              table: [
                [-1000, 0],
                [-999, 51],
                [-997, 255],
              ],
            },
          ],
        },
      },
      {
        name: 'a window and a VOI LUT of 16 bits: both are offered, the window first',
        verdict: 'READ',
        build: one({
          change: change(ds(0x00281050, 40), ds(0x00281051, 400), voiLut([2, 0, 16], [0, 65535])),
        }),
        image: {
          windows: [
            { centre: 40, width: 400, function: 'LINEAR' },
            {
              centre: 1,
              width: 2,
              function: 'LINEAR',
              explanation: 'Table 1',
              table: [
                [0, 0],
                [1, 255],
              ],
            },
          ],
        },
      },
      {
        name: 'a VOI LUT of 8 bits, packed two to a word',
        verdict: 'READ',
        build: one({ change: change(voiLut([4, 10, 8], [0x6600, 0xff99])) }),
        image: {
          windows: [
            {
              centre: 12,
              width: 4,
              function: 'LINEAR',
              explanation: 'Table 1',
              table: [
                [10, 0],
                [11, 102],
                [12, 153],
                [13, 255],
              ],
            },
          ],
        },
      },
      ...(
        [
          ['too short', voiLut([4, 0, 16], [0, 1, 2])],
          ['with more than its bits hold', voiLut([2, 0, 8], [0, 300])],
          ['without a descriptor', voiLut([], [0, 1])],
        ] as const
      ).map(([name, element]) => ({
        name: `a VOI LUT ${name}`,
        verdict: 'READ+' as const,
        code: 'bad-voi-lut',
        build: one({ change: change(element) }),
        image: { windows: [] },
      })),
    ] as unknown as CorpusRow['cases'],
  },
];
