import { deflateRawSync } from 'node:zlib';
import { type WriteElement, writeDataSet } from '../../../core/dicom/write/index.js';
import { ctElements, ctSlice } from '../ctSlice.js';
import { leftOut, PLAIN_IMAGE, PLAIN_STORED, plainRead, plainWithFinding } from '../plainSlice.js';
import {
  BIG_ENDIAN,
  concat,
  EXPLICIT,
  IMPLICIT,
  latin1,
  metaBytes,
  OPEN,
  placeOf,
  rawElement,
  rawFile,
  SYNTAX,
} from '../rawBytes.js';
import type { CorpusRow } from '../row.js';

const explicit = (): Uint8Array => writeDataSet(ctElements(), EXPLICIT);
const implicit = (): Uint8Array => writeDataSet(ctElements(), IMPLICIT);
const bigEndian = (): Uint8Array => writeDataSet(ctElements(), BIG_ENDIAN);

/** More header than the first step of reading takes. */
const LONG_HEADER: Readonly<Record<number, WriteElement>> = {
  593936: { tag: 0x00091010, vr: 'OB', value: new Uint8Array(20_000).fill(7) },
};

function preambleOf(text: string): Uint8Array {
  return concat(latin1(text), new Uint8Array(128 - text.length));
}

/** Section A, how a file is wrapped: rows 6 to 11, 17 and 18. */
export const CONTAINER_ROWS: readonly CorpusRow[] = [
  {
    // pydicom/pydicom 150, 503, 2231; dcmjs-org/dcmjs 93; cornerstonejs/dicomParser 12
    row: 6,
    section: 'A',
    title: 'No preamble/"DICM", bare dataset',
    outcome: 'read with a finding when it reaches an image; otherwise left out',
    cases: [
      plainWithFinding('implicit', 'no-preamble', implicit),
      plainWithFinding('explicit', 'no-preamble', explicit),
      plainWithFinding('a header of 20 KB', 'no-preamble', () =>
        writeDataSet(ctElements({ change: LONG_HEADER }), IMPLICIT),
      ),
      plainWithFinding('meta information without a preamble', 'no-preamble', () =>
        ctSlice().subarray(132),
      ),
      leftOut('SKIP', 'no image in it', 'not-dicom', 'Not a DICOM file', () =>
        writeDataSet(
          ctElements().filter(({ tag }) => tag < 0x00200000),
          EXPLICIT,
        ),
      ),
      leftOut('SKIP', 'a group that begins no data set', 'not-dicom', 'Not a DICOM file', () =>
        writeDataSet(
          ctElements().filter(({ tag }) => tag >= 0x00200000),
          EXPLICIT,
        ),
      ),
    ],
  },
  {
    // pydicom/pydicom PR 217
    row: 7,
    section: 'A',
    title: 'No meta header, dataset explicit (LE or BE)',
    outcome: 'read with a finding; the first elements tell the encoding',
    cases: [
      plainWithFinding('little endian', 'no-transfer-syntax', () =>
        rawFile(new Uint8Array(0), explicit()),
      ),
      plainWithFinding('big endian', 'no-transfer-syntax', () =>
        rawFile(new Uint8Array(0), bigEndian()),
      ),
      plainWithFinding('big endian without a preamble', 'no-transfer-syntax', bigEndian),
    ],
  },
  {
    // pydicom/pydicom 341, 342 (a warning against a blind default); suyashkumar/dicom 329
    row: 8,
    section: 'A',
    title: 'Meta present, no Transfer Syntax UID',
    outcome: 'read with a finding when its bytes fit one encoding; refused when compressed',
    cases: [
      plainWithFinding('explicit', 'no-transfer-syntax', () =>
        rawFile(metaBytes(undefined), explicit()),
      ),
      plainWithFinding('implicit', 'no-transfer-syntax', () =>
        rawFile(metaBytes(undefined), implicit()),
      ),
      plainWithFinding('big endian', 'no-transfer-syntax', () =>
        rawFile(metaBytes(undefined), bigEndian()),
      ),
      leftOut('REFUSE', 'compressed', 'no-transfer-syntax', 'does not say how', () => {
        const pixels = { tag: 0x7fe00010, vr: 'OB', fragments: [Uint8Array.of(1, 2)] } as const;
        const elements = ctElements({ change: { 2145386512: pixels } });
        return rawFile(metaBytes(undefined), writeDataSet(elements, EXPLICIT));
      }),
      leftOut('REFUSE', 'deflated', 'no-transfer-syntax', 'does not say how', () =>
        rawFile(metaBytes(undefined), new Uint8Array(deflateRawSync(explicit()))),
      ),
    ],
  },
  {
    // pydicom/pydicom 503
    row: 9,
    section: 'A',
    title: 'File meta itself implicit VR',
    outcome: 'read with a finding',
    cases: [
      plainWithFinding('data set explicit', 'meta-implicit', () =>
        rawFile(metaBytes(SYNTAX.explicit, { encoding: IMPLICIT }), explicit()),
      ),
      plainWithFinding('data set implicit', 'meta-implicit', () =>
        rawFile(metaBytes(SYNTAX.implicit, { encoding: IMPLICIT }), implicit()),
      ),
    ],
  },
  {
    // dgobbi/vtk-dicom 158
    row: 10,
    section: 'A',
    title: '(0002,0000) wrong length',
    outcome: 'read with a finding; the meta information ends where its group ends',
    cases: [4, 0, 5000, OPEN].map((groupLength) =>
      plainWithFinding(`says ${groupLength}`, 'meta-length', () =>
        rawFile(metaBytes(SYNTAX.explicit, { groupLength }), explicit()),
      ),
    ) as unknown as CorpusRow['cases'],
  },
  {
    // PS3.10 7.1
    row: 11,
    section: 'A',
    title: 'Executable/TIFF bytes in preamble',
    outcome: 'read; the 128 bytes are ignored and copied nowhere',
    cases: [
      plainRead('a TIFF', () =>
        rawFile(metaBytes(SYNTAX.explicit), explicit(), preambleOf('II*\0DONOTCOPY')),
      ),
      plainRead('an executable', () =>
        rawFile(metaBytes(SYNTAX.explicit), explicit(), preambleOf('MZ\x90\0DONOTCOPY')),
      ),
      plainRead('what begins a data set', () =>
        rawFile(metaBytes(SYNTAX.explicit), explicit(), preambleOf('\x08\0\x05\0CS\x0a\0')),
      ),
    ],
  },
  {
    // pydicom/pydicom 1642
    row: 17,
    section: 'A',
    title: 'File cut inside the header',
    outcome: 'refused with the byte and the attribute',
    cases: [
      leftOut('REFUSE', 'in a value', 'cut-header', 'ends at byte', () =>
        ctSlice().subarray(0, placeOf(ctSlice(), 0x00200037, 'DS') + 12),
      ),
      leftOut('REFUSE', 'in a value, named', 'cut-header', 'inside (0020,0037)', () =>
        ctSlice().subarray(0, placeOf(ctSlice(), 0x00200037, 'DS') + 12),
      ),
      leftOut('REFUSE', 'in the head of an element', 'cut-header', 'ends at byte', () =>
        ctSlice().subarray(0, placeOf(ctSlice(), 0x00200037, 'DS') + 5),
      ),
      leftOut('REFUSE', 'in the meta information', 'cut-header', 'ends at byte', () =>
        ctSlice().subarray(0, 160),
      ),
    ],
  },
  {
    // dgobbi/vtk-dicom 125, 201 (an endless loop)
    row: 18,
    section: 'A',
    title: 'Elements after Pixel Data, (FFFC,FFFC), trailing zeros',
    outcome: 'read; what follows the pixels is not looked at',
    cases: [
      plainRead('trailing padding', () =>
        concat(ctSlice(), rawElement(0xfffcfffc, 'OB', 'long', new Uint8Array(64))),
      ),
      plainRead('zeros', () => concat(ctSlice(), new Uint8Array(4096))),
      plainRead('an element that never ends', () =>
        concat(ctSlice(), rawElement(0x7fe10010, 'OB', 'long', [], OPEN)),
      ),
      plainWithFinding('zeros behind a bare data set', 'no-preamble', () =>
        concat(implicit(), new Uint8Array(4096)),
      ),
      {
        name: 'zeros in a deflated data set',
        verdict: 'READ',
        build: () => ({
          slice: ctSlice({
            transferSyntaxUid: SYNTAX.deflated,
            deflate: (bytes) => new Uint8Array(deflateRawSync(concat(bytes, new Uint8Array(999)))),
          }),
        }),
        image: PLAIN_IMAGE,
        stored: PLAIN_STORED,
      },
    ],
  },
];
