import type { WriteElement } from '../../../core/dicom/write/index.js';
import { ctSlice } from '../ctSlice.js';
import { leftOut, plainRead, plainWithFinding } from '../plainSlice.js';
import {
  concat,
  ITEM,
  ITEM_END,
  insertBefore,
  latin1,
  OPEN,
  placeOf,
  rawElement,
  SEQUENCE_END,
  SYNTAX,
  u32,
} from '../rawBytes.js';
import { rleSlice } from '../rleSlice.js';
import type { CorpusRow } from '../row.js';

/** Inside a sequence: attributes of the image with other values, which must never leak out. */
const DECOY = concat(
  rawElement(0x00280010, 'US', 'short', [9, 9]),
  rawElement(0x00280030, 'DS', 'short', latin1('7\\7 ')),
);
const IMPLICIT_DECOY = rawElement(0x00280010, '', 'implicit', [9, 9]);

/** A private, a public sequence, with whatever bytes inside, before the patient's name. */
function withSequence(tag: number, vr: string, inside: Uint8Array, length: number = OPEN) {
  return insertBefore(ctSlice(), 0x00100010, 'PN', rawElement(tag, vr, 'long', inside, length));
}

const PRIVATE = 0x00091001;
const PUBLIC = 0x00081140;

const openItem = (inside: Uint8Array): Uint8Array => concat(ITEM, u32(OPEN), inside, ITEM_END);
const closedItem = (inside: Uint8Array): Uint8Array => concat(ITEM, u32(inside.length), inside);

/** Sequences in sequences, so many deep, built from the inside. */
function nested(depth: number, tag: number, lengths: 'open' | 'known', explicitVr = true) {
  if (lengths === 'open') {
    const head = concat(rawElement(tag, 'SQ', explicitVr ? 'long' : 'implicit', [], OPEN), ITEM);
    const begin = concat(head, u32(OPEN));
    const end = concat(ITEM_END, SEQUENCE_END);
    const bytes = new Uint8Array((begin.length + end.length) * depth);
    for (let level = 0; level < depth; level++) {
      bytes.set(begin, level * begin.length);
      bytes.set(end, depth * begin.length + level * end.length);
    }
    return bytes;
  }
  const size = explicitVr ? 12 : 8;
  const step = size + 8;
  const bytes = new Uint8Array(step * depth);
  for (let level = 0; level < depth; level++) {
    const left = (depth - level) * step;
    const form = explicitVr ? 'long' : 'implicit';
    bytes.set(rawElement(tag, 'SQ', form, [], left - size), level * step);
    bytes.set(concat(ITEM, u32(left - step)), level * step + size);
  }
  return bytes;
}

const deep = (depth: number, tag: number, lengths: 'open' | 'known'): Uint8Array =>
  insertBefore(ctSlice(), 0x00100010, 'PN', nested(depth, tag, lengths));

/** An icon (PS3.3 F.7) with rows, columns and pixels of its own. */
function icon(pixels: WriteElement): readonly WriteElement[] {
  return [
    { tag: 0x00280002, vr: 'US', value: 1 },
    { tag: 0x00280004, vr: 'CS', value: 'MONOCHROME2' },
    { tag: 0x00280010, vr: 'US', value: 64 },
    { tag: 0x00280011, vr: 'US', value: 64 },
    { tag: 0x00280100, vr: 'US', value: 8 },
    pixels,
  ];
}

const ICON_PIXELS = { tag: 0x7fe00010, vr: 'OB', value: new Uint8Array(4096).fill(9) } as const;

function withIcon(pixels: WriteElement, syntax: string, undefinedLength: boolean): Uint8Array {
  return ctSlice({
    transferSyntaxUid: syntax,
    change: {
      8913408: { tag: 0x00880200, vr: 'SQ', items: [icon(pixels)], undefinedLength },
    },
  });
}

/** Section B, sequences: rows 24, 26, 30, 31, 35 and 36. */
export const SEQUENCE_ROWS: readonly CorpusRow[] = [
  {
    // cornerstonejs/dicomParser 141; CP-246; PS3.5 6.2.2, note 2
    row: 24,
    section: 'B',
    title: 'UN, undefined length',
    outcome: 'read as a sequence in implicit VR little endian',
    cases: [
      plainRead('an open item', () =>
        withSequence(PRIVATE, 'UN', concat(openItem(IMPLICIT_DECOY), SEQUENCE_END)),
      ),
      plainRead('a closed item', () =>
        withSequence(PUBLIC, 'UN', concat(closedItem(IMPLICIT_DECOY), SEQUENCE_END)),
      ),
      plainRead('a sequence in it', () => {
        const inner = rawElement(
          0x00091002,
          '',
          'implicit',
          concat(openItem(IMPLICIT_DECOY), SEQUENCE_END),
          OPEN,
        );
        return withSequence(PRIVATE, 'UN', concat(openItem(inner), SEQUENCE_END));
      }),
      plainRead('no item', () => withSequence(PRIVATE, 'UN', concat(SEQUENCE_END))),
    ],
  },
  {
    // cornerstonejs/dicomParser 114, 49; pydicom/pydicom 242; fo-dicom/fo-dicom 64
    row: 26,
    section: 'B',
    title: 'Private sequence that breaks the rules',
    outcome: 'read; the sequence is skipped as a whole',
    cases: [
      plainRead('no item in it', () =>
        withSequence(PRIVATE, 'SQ', concat(latin1('whatever'), SEQUENCE_END)),
      ),
      plainRead('an odd number of stray bytes', () =>
        withSequence(PRIVATE, 'SQ', concat(latin1('oddly'), [0, 1], SEQUENCE_END)),
      ),
      plainRead('an item that is not closed', () =>
        withSequence(PRIVATE, 'SQ', concat(ITEM, u32(OPEN), DECOY, SEQUENCE_END)),
      ),
      plainRead('an item that reaches past the file', () =>
        withSequence(PRIVATE, 'SQ', concat(ITEM, u32(0x00ffffff), DECOY, SEQUENCE_END)),
      ),
      plainRead('implicit inside explicit', () =>
        withSequence(PRIVATE, 'SQ', concat(openItem(IMPLICIT_DECOY), SEQUENCE_END)),
      ),
      plainRead('of known length, with stray bytes', () =>
        withSequence(PRIVATE, 'SQ', latin1('no item here'), 12),
      ),
      plainRead('of known length, shorter than its item says', () =>
        withSequence(PRIVATE, 'SQ', concat(ITEM, u32(500), DECOY), 8 + DECOY.length),
      ),
      plainRead('10 KB of stray bytes', () =>
        withSequence(PRIVATE, 'SQ', concat(new Uint8Array(10_000).fill(0x41), SEQUENCE_END)),
      ),
    ],
  },
  {
    // pydicom/pydicom 1799; fo-dicom/fo-dicom 1876
    row: 30,
    section: 'B',
    title: 'Undefined-length sequence/item without its delimiter',
    outcome: 'read when only the end of the file is missing and the pixels are whole; else refused',
    cases: [
      plainRead('behind the pixels', () =>
        concat(
          ctSlice(),
          rawElement(0xfffafffa, 'SQ', 'long', concat(ITEM, u32(OPEN), DECOY), OPEN),
        ),
      ),
      plainRead('compressed pixels, the file’s last 8 bytes missing', () =>
        rleSlice().subarray(0, rleSlice().length - 8),
      ),
      leftOut('REFUSE', 'a sequence', 'unclosed-sequence', '(0008,1140)', () =>
        withSequence(PUBLIC, 'SQ', openItem(DECOY)),
      ),
      leftOut('REFUSE', 'an item', 'unclosed-sequence', '(0008,1140)', () =>
        withSequence(PUBLIC, 'SQ', concat(ITEM, u32(OPEN), DECOY, SEQUENCE_END)),
      ),
      leftOut('REFUSE', 'a file cut in it', 'unclosed-sequence', '(0008,1140)', () => {
        const file = withSequence(PUBLIC, 'SQ', concat(openItem(DECOY), SEQUENCE_END));
        return file.subarray(0, placeOf(file, PUBLIC, 'SQ') + 12 + 8 + DECOY.length);
      }),
    ],
  },
  {
    // cornerstonejs/dicomParser 266
    row: 31,
    section: 'B',
    title: 'Delimiter with non-zero length',
    outcome: 'read with a finding; its length is ignored',
    cases: [
      plainWithFinding('of a sequence', 'delimiter-length', () =>
        withSequence(
          PUBLIC,
          'SQ',
          concat(openItem(DECOY), SEQUENCE_END.slice(0, 4), u32(0x00100010)),
        ),
      ),
      plainWithFinding('of an item', 'delimiter-length', () =>
        withSequence(
          PUBLIC,
          'SQ',
          concat(ITEM, u32(OPEN), DECOY, ITEM_END.slice(0, 4), u32(8), SEQUENCE_END),
        ),
      ),
      plainWithFinding('in UN', 'delimiter-length', () =>
        withSequence(
          PRIVATE,
          'UN',
          concat(ITEM, u32(OPEN), IMPLICIT_DECOY, ITEM_END.slice(0, 4), u32(6), SEQUENCE_END),
        ),
      ),
    ],
  },
  {
    // design
    row: 35,
    section: 'B',
    title: 'Nesting hundreds deep',
    outcome: 'refused over a depth of 64',
    cases: [
      plainRead('64 deep, open', () => deep(64, PUBLIC, 'open')),
      plainRead('64 deep, by lengths', () => deep(64, PUBLIC, 'known')),
      ...[65, 300, 30_000].flatMap((depth) =>
        (['open', 'known'] as const).flatMap((lengths) => [
          leftOut('REFUSE', `${depth} deep, ${lengths}`, 'nested-too-deep', '64 deep', () =>
            deep(depth, PUBLIC, lengths),
          ),
          leftOut('REFUSE', `${depth} deep, ${lengths}, private`, 'nested-too-deep', '64', () =>
            deep(depth, PRIVATE, lengths),
          ),
        ]),
      ),
    ],
  },
  {
    // dgobbi/vtk-dicom 41; JuliaHealth/DICOM.jl 80; suyashkumar/dicom 77; ome/scifio 368
    row: 36,
    section: 'B',
    title: 'Icon Image Sequence has its own Pixel Data/Rows',
    outcome: 'read; only the top level counts',
    cases: [
      plainRead('explicit, by lengths', () => withIcon(ICON_PIXELS, SYNTAX.explicit, false)),
      plainRead('explicit, open', () => withIcon(ICON_PIXELS, SYNTAX.explicit, true)),
      plainRead('implicit, open', () => withIcon(ICON_PIXELS, SYNTAX.implicit, true)),
      plainRead('big endian', () => withIcon(ICON_PIXELS, SYNTAX.bigEndian, false)),
      plainRead('an icon in fragments', () =>
        withIcon(
          { tag: 0x7fe00010, vr: 'OB', fragments: [new Uint8Array(300).fill(9)] },
          SYNTAX.explicit,
          true,
        ),
      ),
      leftOut('SKIP', 'no other pixels than the icon’s', 'no-image', 'no Pixel Data', () =>
        ctSlice({
          change: {
            8913408: { tag: 0x00880200, vr: 'SQ', items: [icon(ICON_PIXELS)] },
            2145386512: undefined,
          },
        }),
      ),
    ],
  },
];
