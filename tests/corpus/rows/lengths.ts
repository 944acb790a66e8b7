import { writeDataSet } from '../../../core/dicom/write/index.js';
import { ctElements, ctSlice } from '../ctSlice.js';
import { leftOut, plainWithFinding } from '../plainSlice.js';
import {
  concat,
  IMPLICIT,
  ITEM,
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
import type { CorpusRow } from '../row.js';
import { AT_PRIVATE, withPrivate } from './withPrivate.js';

/** Section B, lengths: rows 32 to 34. */
export const LENGTH_ROWS: readonly CorpusRow[] = [
  {
    // suyashkumar/dicom 65
    row: 32,
    section: 'B',
    title: 'Odd value length',
    outcome: 'read with a finding',
    cases: [
      plainWithFinding('a text of 5 bytes', 'odd-length', () =>
        replaceShort(
          ctSlice(),
          0x00181210,
          'SH',
          rawElement(0x00181210, 'SH', 'short', latin1('Plain')),
        ),
      ),
      plainWithFinding('in an item', 'odd-length', () => {
        const inside = rawElement(0x00091002, 'LO', 'short', latin1('odd'));
        return withPrivate('SQ', 'long', concat(ITEM, u32(inside.length), inside));
      }),
      plainWithFinding('in implicit VR', 'odd-length', () => {
        const elements = writeDataSet(ctElements(), IMPLICIT);
        const odd = rawElement(0x00080004, '', 'implicit', latin1('abc'));
        return rawFile(metaBytes(SYNTAX.implicit), concat(odd, elements));
      }),
    ],
  },
  {
    // malaterre/GDCM PR 214 (CVE-2026-3650); suyashkumar/dicom 349; dgobbi/vtk-dicom 223
    row: 33,
    section: 'B',
    title: 'Declared length > bytes left (4 GB)',
    outcome: 'refused before anything is allocated',
    cases: [
      leftOut('REFUSE', 'bytes', 'cut-header', 'inside (0009,1001)', () =>
        withPrivate('OB', 'long', [1, 2], 0xfffffffe),
      ),
      leftOut('REFUSE', 'a text', 'cut-header', 'inside (0009,1001)', () =>
        withPrivate('UT', 'long', [1, 2], 0x7ffffffe),
      ),
      leftOut('REFUSE', 'a sequence', 'cut-header', 'inside (0009,1001)', () =>
        withPrivate('SQ', 'long', ITEM, 0xfffffffe),
      ),
      leftOut('REFUSE', 'in implicit VR', 'cut-header', 'inside (0008,0004)', () =>
        rawFile(
          metaBytes(SYNTAX.implicit),
          concat(
            rawElement(0x00080001, '', 'implicit', [1, 2]),
            rawElement(0x00080004, '', 'implicit', [1, 2], 0xfffffff0),
          ),
        ),
      ),
      leftOut('REFUSE', 'pixels of 4000 × 4000', 'cut-pixels', 'its pixels go on', () =>
        concat(
          ctSlice({
            change: {
              2621456: { tag: 0x00280010, vr: 'US', value: 4000 },
              2621457: { tag: 0x00280011, vr: 'US', value: 4000 },
              2145386512: undefined,
            },
          }),
          rawElement(0x7fe00010, 'OW', 'long', [1, 2], 0xfffffffe),
        ),
      ),
    ],
  },
  {
    // suyashkumar/dicom 349
    row: 34,
    section: 'B',
    title: 'Undefined length on a non-sequence, non-pixel VR',
    outcome: 'refused with the attribute and the byte',
    cases: ['OB', 'OW', 'UT', 'UC', 'OV'].map((vr) =>
      leftOut('REFUSE', vr, 'undefined-length', AT_PRIVATE, () =>
        withPrivate(vr, 'long', concat([1, 2, 3, 4], SEQUENCE_END), OPEN),
      ),
    ) as unknown as CorpusRow['cases'],
  },
];
