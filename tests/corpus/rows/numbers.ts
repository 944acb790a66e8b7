import type { CtImage } from '../../../core/dicom/index.js';
import type { WriteElement } from '../../../core/dicom/write/index.js';
import { ctSlice } from '../ctSlice.js';
import { leftOut, PLAIN_STORED } from '../plainSlice.js';
import type { CorpusRow, PartOf, RowCase, Verdict } from '../row.js';

/** A slice with one number written in another way. @param image what it then says, or the paths that it must lack */
function numberCase(
  name: string,
  element: WriteElement,
  image: PartOf<CtImage> | readonly string[],
  [verdict, code]: readonly [Verdict, string?] = ['READ'],
): RowCase {
  const isAbsent = Array.isArray(image);
  return {
    name,
    verdict,
    ...(code !== undefined && { code }),
    build: () => ({ slice: ctSlice({ change: { [element.tag]: element } }) }),
    image: { grid: { positionMm: [-10, -20, 0] }, ...(isAbsent ? {} : image) },
    ...(isAbsent && { absent: image }),
    stored: PLAIN_STORED,
  };
}

const spacing = (value: string): WriteElement => ({ tag: 0x00280030, vr: 'DS', value });
const slope = (value: string): WriteElement => ({ tag: 0x00281053, vr: 'DS', value });
const instance = (value: string): WriteElement => ({ tag: 0x00200013, vr: 'IS', value });

const NO_RESCALE = ['pixels.rescale'];

function withWindow(name: string, centre: string, width: string): RowCase {
  return {
    name,
    verdict: 'READ+',
    code: 'not-a-number',
    build: () => ({
      slice: ctSlice({
        change: {
          2625616: { tag: 0x00281050, vr: 'DS', value: centre },
          2625617: { tag: 0x00281051, vr: 'DS', value: width },
        },
      }),
    }),
    image: { windows: [], pixels: { unit: 'HU' } },
    stored: PLAIN_STORED,
  };
}

/** Shown pixel by pixel; what is taken away is all measuring. */
const refusedSpacing = (name: string, value: string): RowCase => ({
  name,
  verdict: 'REFUSE',
  code: 'no-pixel-spacing',
  says: 'pixel spacing',
  build: () => ({ slice: ctSlice({ change: { 2621488: spacing(value) } }) }),
  image: { grid: { pixelSpacingMm: [1, 1], unscaled: true } },
  stored: PLAIN_STORED,
});

/** Section C, numbers: rows 46 to 50. */
export const NUMBER_ROWS: readonly CorpusRow[] = [
  {
    // dcmjs-org/dcmjs 287; fo-dicom/fo-dicom PR 1915; dgobbi/vtk-dicom 130
    row: 46,
    section: 'C',
    title: 'DS with decimal comma "0,143\\0,143"',
    outcome: 'read with a finding; a lone comma is a point; anything else is no number',
    cases: [
      numberCase('spacing', spacing('0,143\\0,143'), { grid: { pixelSpacingMm: [0.143, 0.143] } }, [
        'READ+',
        'decimal-comma',
      ]),
      numberCase('slope', slope('0,5'), { pixels: { rescale: { slope: 0.5, intercept: -1024 } } }, [
        'READ+',
        'decimal-comma',
      ]),
      refusedSpacing('two commas', '1,000,5\\1'),
      refusedSpacing('comma and point', '1,000.5\\1'),
      refusedSpacing('a comma alone', ',\\1'),
    ],
  },
  {
    // pydicom/pydicom 1264, 1632
    row: 47,
    section: 'C',
    title: 'DS over 16 bytes',
    outcome: 'read in full precision',
    cases: [
      numberCase('spacing', spacing('0.1234567890123456789\\0.98765432109876543'), {
        grid: { pixelSpacingMm: [0.12345678901234568, 0.9876543210987654] },
      }),
    ],
  },
  {
    // fo-dicom/fo-dicom 1756; pydicom/pydicom PR 1334; CP-2352
    row: 48,
    section: 'C',
    title: 'DS "NaN", "Inf", text',
    outcome: 'absent; what needs it is refused, a window is left out; with a finding',
    cases: [
      ...['NaN\\NaN', 'Inf\\1', 'wide\\1', '0x1\\1', '1e999\\1'].map((value) =>
        refusedSpacing(`spacing ${value}`, value),
      ),
      leftOut('REFUSE', 'position', 'no-geometry', 'Image Position', () =>
        ctSlice({ change: { 2097202: { tag: 0x00200032, vr: 'DS', value: '1\\NaN\\2' } } }),
      ),
      numberCase('slope NaN', slope('NaN'), NO_RESCALE, ['REFUSE', 'bad-rescale']),
      numberCase('slope Inf, told', slope('Inf'), NO_RESCALE, ['READ+', 'not-a-number']),
      withWindow('window centre NaN', 'NaN', '400'),
      withWindow('window width in words', '40', 'wide'),
      numberCase(
        'thickness in words',
        { tag: 0x00180050, vr: 'DS', value: 'thin' },
        ['acquisition.thicknessMm'],
        ['READ+', 'not-a-number'],
      ),
    ] as unknown as CorpusRow['cases'],
  },
  {
    // pydicom/pydicom PR 1240, 1643
    row: 49,
    section: 'C',
    title: 'IS "1.0" / "4.1"',
    outcome: '“1.0” is 1; “4.1” is absent, with a finding, and not 4',
    cases: [
      numberCase('1.0', instance('1.0'), { instanceNumber: 1 }),
      numberCase('7.000', instance(' 7.000'), { instanceNumber: 7 }),
      numberCase('4.1', instance('4.1'), ['instanceNumber'], ['READ+', 'not-an-integer']),
      numberCase('words', instance('four'), ['instanceNumber'], ['READ+', 'not-an-integer']),
    ],
  },
  {
    // pydicom/pydicom 210; fo-dicom/fo-dicom 2043
    row: 50,
    section: 'C',
    title: 'Numeric tag present but empty',
    outcome: 'absent, not 0',
    cases: [
      numberCase('instance number', instance(''), ['instanceNumber']),
      numberCase('series number of blanks', { tag: 0x00200011, vr: 'IS', value: '   ' }, [
        'acquisition.seriesNumber',
      ]),
      numberCase('thickness', { tag: 0x00180050, vr: 'DS', value: '' }, [
        'acquisition.thicknessMm',
      ]),
      numberCase('phase', { tag: 0x00209241, vr: 'FL', value: [] }, ['acquisition.phasePercent']),
      numberCase('padding', { tag: 0x00280120, vr: 'US', value: [] }, ['pixels.padding']),
      numberCase('slope', slope(''), NO_RESCALE, ['REFUSE', 'no-rescale']),
      refusedSpacing('spacing', ''),
      refusedSpacing('one of two spacings', '0.5\\'),
      leftOut('SKIP', 'Rows', 'no-image', 'Rows', () =>
        ctSlice({ change: { 2621456: { tag: 0x00280010, vr: 'US', value: [] } } }),
      ),
    ],
  },
];
