import { deflateRawSync } from 'node:zlib';
import { writeDataSet } from '../../../core/dicom/write/index.js';
import { ctElements, ctSlice } from '../ctSlice.js';
import { leftOut, PLAIN_IMAGE, PLAIN_STORED, plainWithFinding } from '../plainSlice.js';
import { BIG_ENDIAN, EXPLICIT, IMPLICIT, metaBytes, rawFile, SYNTAX } from '../rawBytes.js';
import type { CorpusRow, RowCase } from '../row.js';

const PRIVATE_BIG = '1.2.840.113619.5.2';

const deflate = (bytes: Uint8Array): Uint8Array => new Uint8Array(deflateRawSync(bytes));

/** Pixels enough that a length read in the wrong encoding may still fall inside the file. */
const LARGE = {
  rows: 1024,
  columns: 1024,
  stored: Int16Array.from({ length: 1024 * 1024 }, (_, index) => index % 2000),
};

function largeCase(name: string, build: () => Uint8Array): RowCase {
  return {
    name,
    verdict: 'READ+',
    code: 'syntax-mismatch',
    build: () => ({ slice: build() }),
    image: { grid: { positionMm: [-10, -20, 0], rows: 1024, columns: 1024 } },
    stored: [0, 1, 2, 3],
  };
}

/** A slice whose padding is −2000 in two's complement: 63536 without the sign (PS3.5 6.2, SS and US). */
function paddedSlice(name: string, signed: boolean, transferSyntaxUid: string): RowCase {
  const padding = signed
    ? ({ tag: 0x00280120, vr: 'SS', value: -2000 } as const)
    : ({ tag: 0x00280120, vr: 'US', value: 63536 } as const);
  const word = signed ? -2000 : 63536;
  return {
    name,
    verdict: 'READ',
    build: () => ({
      slice: ctSlice({
        transferSyntaxUid,
        signed,
        rows: 1,
        columns: 2,
        stored: signed ? Int16Array.of(-2000, 40) : Uint16Array.of(63536, 40),
        change: { 2621728: padding },
      }),
    }),
    image: { pixels: { signed, padding: { low: word, high: word } } },
    stored: [word, 40],
  };
}

/** Section B, the encoding as a whole: rows 19 to 23. */
export const ENCODING_ROWS: readonly CorpusRow[] = [
  {
    // pydicom/pydicom 1943, 999 (a probe that misfires inside sequences); Enet4/dicom-rs PR 756
    row: 19,
    section: 'B',
    title: 'Says explicit, is implicit (or reverse)',
    outcome: 'read with a finding; decided once, by the first elements',
    cases: [
      plainWithFinding('says explicit, is implicit', 'syntax-mismatch', () =>
        rawFile(metaBytes(SYNTAX.explicit), writeDataSet(ctElements(), IMPLICIT)),
      ),
      plainWithFinding('says implicit, is explicit', 'syntax-mismatch', () =>
        rawFile(metaBytes(SYNTAX.implicit), writeDataSet(ctElements(), EXPLICIT)),
      ),
      plainWithFinding('says little endian, is big', 'syntax-mismatch', () =>
        rawFile(metaBytes(SYNTAX.explicit), writeDataSet(ctElements(), BIG_ENDIAN)),
      ),
      plainWithFinding('says big endian, is little', 'syntax-mismatch', () =>
        rawFile(metaBytes(SYNTAX.bigEndian), writeDataSet(ctElements(), EXPLICIT)),
      ),
      largeCase('says implicit, is explicit, 2 MB', () =>
        rawFile(metaBytes(SYNTAX.implicit), writeDataSet(ctElements(LARGE), EXPLICIT)),
      ),
      largeCase('says explicit, is implicit, 2 MB', () =>
        rawFile(metaBytes(SYNTAX.explicit), writeDataSet(ctElements(LARGE), IMPLICIT)),
      ),
    ],
  },
  {
    // Enet4/dicom-rs 460 (-2000 read as 63536); dcm4che/dcm4che 1368
    row: 20,
    section: 'B',
    title: 'Implicit VR: US-or-SS tags',
    outcome: 'read; the sign follows Pixel Representation',
    cases: [
      paddedSlice('signed', true, SYNTAX.implicit),
      paddedSlice('unsigned', false, SYNTAX.implicit),
      paddedSlice('signed, explicit', true, SYNTAX.explicit),
    ],
  },
  {
    // PS3.5 A.3; ImagingDataCommons/highdicom PR 173
    row: 21,
    section: 'B',
    title: 'Explicit VR big endian (retired)',
    outcome: 'read, words swapped',
    cases: [
      {
        name: 'words',
        verdict: 'READ',
        build: () => ({ slice: ctSlice({ transferSyntaxUid: SYNTAX.bigEndian }) }),
        image: PLAIN_IMAGE,
        stored: PLAIN_STORED,
      },
      paddedSlice('a padding value', true, SYNTAX.bigEndian),
      leftOut('REFUSE', '8-bit pixels', 'not-a-ct-slice', '8 bits', () =>
        ctSlice({
          transferSyntaxUid: SYNTAX.bigEndian,
          change: {
            2621696: { tag: 0x00280100, vr: 'US', value: 8 },
            2145386512: { tag: 0x7fe00010, vr: 'OB', value: new Uint8Array(20) },
          },
        }),
      ),
    ],
  },
  {
    // cornerstonejs/dicomParser 107
    row: 22,
    section: 'B',
    title: 'Private "implicit big endian" 1.2.840.113619.5.2',
    outcome: 'refused by its UID',
    cases: [
      leftOut('REFUSE', 'header implicit', 'unsupported-transfer-syntax', PRIVATE_BIG, () =>
        rawFile(metaBytes(PRIVATE_BIG), writeDataSet(ctElements(), IMPLICIT)),
      ),
      leftOut('REFUSE', 'header big endian too', 'unsupported-transfer-syntax', PRIVATE_BIG, () =>
        rawFile(
          metaBytes(PRIVATE_BIG),
          writeDataSet(ctElements(), { explicitVr: false, littleEndian: false }),
        ),
      ),
    ],
  },
  {
    // cornerstonejs/dicomParser 109; fo-dicom/fo-dicom 227; Enet4/dicom-rs 350; PS3.5 A.5
    row: 23,
    section: 'B',
    title: 'Deflated explicit LE',
    outcome: 'read, never to more than 256 MB; refused when damaged',
    cases: [
      {
        name: 'whole',
        verdict: 'READ',
        build: () => ({ slice: ctSlice({ transferSyntaxUid: SYNTAX.deflated, deflate }) }),
        image: PLAIN_IMAGE,
        stored: PLAIN_STORED,
      },
      leftOut('REFUSE', 'cut', 'deflate-damaged', 'deflated', () => {
        const whole = ctSlice({ transferSyntaxUid: SYNTAX.deflated, deflate });
        return whole.subarray(0, whole.length - 40);
      }),
      leftOut('REFUSE', 'not deflated at all', 'deflate-damaged', 'deflated', () =>
        rawFile(metaBytes(SYNTAX.deflated), writeDataSet(ctElements(), EXPLICIT)),
      ),
    ],
  },
];
