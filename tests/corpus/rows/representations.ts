import { writeDataSet } from '../../../core/dicom/write/index.js';
import { ctElements, ctSlice } from '../ctSlice.js';
import { leftOut, PLAIN_IMAGE, PLAIN_STORED, plainRead, plainWithFinding } from '../plainSlice.js';
import {
  BIG_ENDIAN,
  concat,
  type HeadForm,
  ITEM,
  insertBefore,
  latin1,
  metaBytes,
  OPEN,
  rawElement,
  rawFile,
  replaceShort,
  SEQUENCE_END,
  SYNTAX,
  u32,
} from '../rawBytes.js';
import type { CorpusRow, RowCase } from '../row.js';
import { AT_PRIVATE, withPrivate } from './withPrivate.js';

/** The kernel label with other letters in place of its VR. */
function kernelWith(letters: string, form: HeadForm): Uint8Array {
  const value = latin1('Plain ');
  return replaceShort(ctSlice(), 0x00181210, 'SH', rawElement(0x00181210, letters, form, value));
}

/** Spacing and a length in the header, in other representations than the standard's. */
const WRONG_VR = {
  2621456: { tag: 0x00280010, vr: 'UL', value: 4 },
  2621457: { tag: 0x00280011, vr: 'IS', value: 5 },
  2621488: { tag: 0x00280030, vr: 'FD', value: [0.5, 0.25] },
  2097171: { tag: 0x00200013, vr: 'US', value: 1 },
  1577488: { tag: 0x00181210, vr: 'LO', value: 'Plain' },
} as const;

/** Eight bytes that read as a VR where a reader takes them for the next head. */
const LIKE_A_HEAD = latin1('\x10\0\x20\0LO\x02\0');

/** Section B, value representations and lengths: rows 25, 27 to 29 and 37. */
export const REPRESENTATION_ROWS: readonly CorpusRow[] = [
  {
    // dcmjs-org/dcmjs PR 492; PS3.5 6.2.2
    row: 25,
    section: 'B',
    title: 'UN, defined length, really a sequence',
    outcome: 'read; its bytes are stepped over as they are',
    cases: [
      plainRead('implicit inside', () =>
        withPrivate(
          'UN',
          'long',
          concat(ITEM, u32(10), rawElement(0x00280010, '', 'implicit', [9, 9])),
        ),
      ),
      plainRead('explicit inside', () =>
        withPrivate(
          'UN',
          'long',
          concat(ITEM, u32(10), rawElement(0x00280010, 'US', 'short', [9, 9])),
        ),
      ),
      plainRead('an item that reaches past it', () =>
        withPrivate('UN', 'long', concat(ITEM, u32(0xfffffff0), [1, 2])),
      ),
    ],
  },
  {
    // fo-dicom/fo-dicom 1660, 47, 1847
    row: 27,
    section: 'B',
    title: 'VR letters invalid ("--", blanks, missing)',
    outcome: 'read with a finding where what follows tells the length; refused otherwise',
    cases: [
      ...['--', '  ', '\0\0', '??'].flatMap((letters): RowCase[] => [
        plainWithFinding(`“${letters}” and 2 bytes of length`, 'vr-guessed', () =>
          kernelWith(letters, 'short'),
        ),
        plainWithFinding(`“${letters}” and 4 bytes of length`, 'vr-guessed', () =>
          kernelWith(letters, 'long'),
        ),
      ]),
      plainWithFinding('none', 'vr-guessed', () => kernelWith('', 'implicit')),
      leftOut('REFUSE', 'no length fits', 'bad-vr', AT_PRIVATE, () =>
        withPrivate('--', 'short', [1, 2, 3, 4], 0x7777),
      ),
    ] as unknown as CorpusRow['cases'],
  },
  {
    // cornerstonejs/dicomParser 284
    row: 28,
    section: 'B',
    title: 'OV / SV / UV (12-byte header)',
    outcome: 'read',
    cases: [
      ...['OV', 'SV', 'UV'].flatMap((vr) => [
        plainRead(vr, () => withPrivate(vr, 'long', LIKE_A_HEAD)),
        plainRead(`${vr} in an item`, () => {
          const inside = rawElement(0x00091002, vr, 'long', LIKE_A_HEAD);
          return withPrivate(
            'SQ',
            'long',
            concat(ITEM, u32(inside.length), inside, SEQUENCE_END),
            OPEN,
          );
        }),
      ]),
    ] as unknown as CorpusRow['cases'],
  },
  {
    // fo-dicom/fo-dicom 1941; cornerstonejs/dicomParser 34
    row: 29,
    section: 'B',
    title: 'Valid but wrong VR for the tag (e.g. group length as UN)',
    outcome:
      'read with a finding; the file’s tells how it is written, the standard’s what it means',
    cases: [
      plainWithFinding('a group length as UN', 'vr-differs', () =>
        insertBefore(
          ctSlice(),
          0x00100010,
          'PN',
          rawElement(0x00100000, 'UN', 'long', [4, 0, 0, 0]),
        ),
      ),
      plainWithFinding('Rows as UL, Columns as text, Pixel Spacing as FD', 'vr-differs', () =>
        ctSlice({ change: WRONG_VR }),
      ),
      plainWithFinding('the same in big endian', 'vr-differs', () =>
        rawFile(
          metaBytes(SYNTAX.bigEndian),
          writeDataSet(ctElements({ change: WRONG_VR }), BIG_ENDIAN),
        ),
      ),
      plainWithFinding('Rows as UN', 'vr-differs', () =>
        replaceShort(ctSlice(), 0x00280010, 'US', rawElement(0x00280010, 'UN', 'long', [4, 0])),
      ),
    ],
  },
  {
    // dcmjs-org/dcmjs 130; fo-dicom/fo-dicom 859; pydicom/pynetdicom 88
    row: 37,
    section: 'B',
    title: 'UIDs padded by space/NUL, leading zeros, 64 long',
    outcome: 'read; padding is trimmed, nothing else is changed',
    cases: [
      {
        name: 'one series whose UID is padded in two ways',
        verdict: 'READ',
        build: () => ({
          a: ctSlice({ number: 1, z: 0, change: seriesUid('2.25.77001.2.1 ') }),
          b: ctSlice({ number: 2, z: 1, change: seriesUid('2.25.77001.2.1\0') }),
          c: ctSlice({ number: 3, z: 2 }),
        }),
        image: PLAIN_IMAGE,
        stored: PLAIN_STORED,
      },
      {
        name: 'leading zeros',
        verdict: 'READ',
        build: () => ({ slice: ctSlice({ change: seriesUid('2.25.077001.02.1') }) }),
        image: { acquisition: { seriesInstanceUid: '2.25.077001.02.1' } },
        stored: PLAIN_STORED,
      },
      {
        name: '64 characters',
        verdict: 'READ',
        build: () => ({ slice: ctSlice({ change: seriesUid(`2.25.${'7'.repeat(59)}`) }) }),
        image: { acquisition: { seriesInstanceUid: `2.25.${'7'.repeat(59)}` } },
        stored: PLAIN_STORED,
      },
    ],
  },
];

function seriesUid(value: string) {
  return { 2097166: { tag: 0x0020000e, vr: 'UI', value } } as const;
}
