import type { Evidence, Note, NoteRegion } from '../../core/note/index.js';
import type { RegionValue } from '../../core/region/index.js';
import type { FolderIndex, Stack } from '../../core/stack/index.js';

/** A value with plausible figures. Everything in this file is invented and stands for no patient. */
export function value(meanHu: number, sdHu: number, n: number, areaMm2: number): RegionValue {
  return {
    n,
    meanHu,
    sdHu,
    minHu: Math.round(meanHu - 2.4 * sdHu),
    maxHu: Math.round(meanHu + 2.6 * sdHu),
    medianHu: meanHu - 0.08 * sdHu,
    areaMm2,
    sampledAreaMm2: n * 0.1521,
    snr: meanHu / sdHu,
    sliceIndex: 20,
    sliceOffsetMm: 0,
    sopInstanceUid: '1.2.3',
    frameNumber: null,
    standardErrorHu: null,
    placementHu: 4.1,
    flags: [],
  };
}

const edge = {
  code: 'near-edge',
  text: 'A strong edge lies within one blur width: the mean is not lumen alone.',
};
const circle = (x: number, y: number, z: number, r: number): NoteRegion['shape'] => ({
  kind: 'ellipse',
  centreMm: [x, y, z],
  radiiMm: [r, r],
});

type Draft = Pick<NoteRegion, 'id' | 'role' | 'label' | 'soft' | 'sharp'> & Partial<NoteRegion>;
const region = (draft: Draft): NoteRegion => ({
  shape: circle(35.3, -20.7, 10, 1.1),
  place: '',
  findingId: null,
  quote: null,
  quoteReason: '',
  quoteBy: 'proposal',
  ...draft,
});

const flagged = (base: RegionValue): RegionValue => ({ ...base, flags: [edge] });

export const note: Pick<
  Note,
  'findings' | 'regions' | 'contrasts' | 'noise' | 'stents' | 'profiles'
> = {
  stents: [],
  profiles: [],
  noise: 'reference',
  findings: [
    {
      id: 'D1',
      segment: null,
      kind: 'reference',
      nominalMm: null,
      lengthMm: null,
      overlap: null,
      location: '',
      assessability: null,
      reason: '',
    },
    {
      id: 'D2',
      segment: 7,
      kind: 'stent',
      nominalMm: 3,
      lengthMm: null,
      overlap: null,
      location: '',
      assessability: 'limited',
      reason: 'blooming of the struts',
    },
    {
      id: 'D3',
      segment: 11,
      kind: 'non-calcified plaque',
      nominalMm: null,
      lengthMm: null,
      overlap: null,
      location: '',
      assessability: 'assessable',
      reason: '',
    },
  ],
  regions: [
    region({
      id: 'R1',
      role: 'reference',
      label: 'Reference 1',
      place: 'aortic root',
      findingId: 'D1',
      quote: 'soft',
      soft: value(369.8, 6.1, 1322, 201),
      sharp: value(370.2, 27, 1322, 201),
    }),
    region({
      id: 'L2',
      role: 'lumen',
      label: 'Lumen 2',
      place: 'in stent, middle third',
      findingId: 'D2',
      quote: 'sharp',
      quoteReason: 'struts apart',
      soft: flagged(value(532.4, 59.7, 17, 2.6)),
      sharp: flagged(value(325.1, 116, 17, 2.6)),
    }),
    region({
      id: 'W1',
      role: 'wall',
      label: 'Wall 1',
      place: 'outer edge',
      findingId: 'D2',
      quote: 'soft',
      soft: value(47.2, 22.4, 14, 2.2),
      sharp: value(50.1, 31.3, 14, 2.2),
    }),
    region({
      id: 'P1',
      role: 'plaque',
      label: 'Plaque 1',
      place: 'proximal shoulder',
      findingId: 'D3',
      quote: 'soft',
      soft: value(62.9, 18.2, 41, 6.2),
      sharp: value(44.6, 38.9, 41, 6.2),
    }),
    region({
      id: 'F1',
      role: 'fat',
      label: 'Fat 1',
      soft: value(-88.3, 12.6, 96, 14.6),
      sharp: value(-90.7, 33.1, 96, 14.6),
    }),
  ],
  contrasts: [
    {
      id: 'C1',
      lumen: 'L2',
      wall: 'W1',
      noise: 'reference',
      reference: 'R1',
      formula: 'CNR = (lumen − wall) / SD of reference',
      soft: 79.54,
      sharp: 10.19,
      flags: [],
    },
  ],
};

export const evidence: readonly Evidence[] = [
  { check: 'Patient and study', state: 'agrees', text: 'same identifiers' },
  { check: 'Frame of reference', state: 'agrees', text: 'same' },
  { check: 'Orientation', state: 'agrees', text: 'within 0.01°' },
  { check: 'Cardiac phase', state: 'agrees', text: '75 % in both' },
  { check: 'Tube voltage', state: 'agrees', text: '120 kVp in both' },
  { check: 'Field of view', state: 'differs', text: '200 mm and 160 mm' },
  { check: 'Contrast agent', state: 'unknown', text: 'not stated by the sharp series' },
  { check: 'Shift in the pixels', state: 'agrees', text: '0.02 mm' },
];

function stack(
  seriesNumber: number,
  kernelLabel: string,
  description: string,
  slices: number,
  spacingMm: number,
  findings: Stack['findings'] = [],
): Stack {
  const one = (index: number): Stack['slices'][0] => ({
    fileId: seriesNumber * 1000 + index,
    file: `series${seriesNumber}/${index}.dcm`,
    alongMm: index * spacingMm,
    image: {
      sopClassUid: '1.2.840.10008.5.1.4.1.1.2',
      sopInstanceUid: `1.2.3.${seriesNumber}.${index}`,
      transferSyntaxUid: '1.2.840.10008.1.2.1',
      imageType: ['ORIGINAL', 'PRIMARY', 'AXIAL'],
      synthetic: true,
      identity: {
        patientId: 'D-0101',
        patientName: 'Rowan^Alder',
        patientBirthDate: '19580302',
        studyInstanceUid: '1.2.3',
        studyDate: '20260110',
        studyDescription: 'CTA heart',
      },
      acquisition: {
        seriesInstanceUid: `1.2.3.${seriesNumber}`,
        seriesNumber,
        seriesDescription: description,
        kernelLabel,
        phasePercent: 75,
        kvp: 120,
        thicknessMm: 0.6,
        lossy: false,
      },
      grid: {
        positionMm: [-100, -100, index * spacingMm],
        rowDirection: [1, 0, 0],
        columnDirection: [0, 1, 0],
        pixelSpacingMm: [0.39, 0.39],
        rows: 512,
        columns: 512,
      },
      pixels: {
        bitsAllocated: 16,
        bitsStored: 12,
        highBit: 11,
        signed: false,
        photometric: 'MONOCHROME2',
        unit: 'HU',
      },
      windows: [],
      findings: [],
    },
  });
  const rest = Array.from({ length: slices - 1 }, (_, i) => one(i + 1));
  return {
    key: `1.2.3.${seriesNumber}`,
    slices: [one(0), ...rest],
    sliceSpacingMm: spacingMm,
    unit: 'HU',
    findings,
  };
}

export const index: FolderIndex = {
  files: 131,
  stacks: [
    stack(3, 'Bs-1', 'Heart 75 % soft', 40, 0.5),
    stack(4, 'Sh-2', 'Heart 75 % sharp', 56, 0.36, [
      { code: 'gap', text: 'Two slices are missing at 14.2 mm: the gap is drawn.' },
    ]),
    stack(5, 'Sh-3', 'Heart 40 % sharp', 30, 0.36),
  ],
  leftOut: [
    { file: 'readme.txt', code: 'not-dicom', text: 'Not a DICOM file.' },
    { file: 'a/notes.txt', code: 'not-dicom', text: 'Not a DICOM file.' },
    { file: 'series1/1.dcm', code: 'localizer', text: 'A localizer, not a slice of a volume.' },
    { file: 'dose/1.dcm', code: 'no-image', text: 'A dose report: it holds no image.' },
  ],
};
