import type { WriteElement } from '../../../core/dicom/write/index.js';
import { CORPUS_ROOT, type CtSliceOptions, ctSlice } from '../ctSlice.js';
import { change, without } from '../element.js';
import type { CorpusFiles, CorpusRow } from '../row.js';

/** Files of slices, named by their order. */
function files(...slices: readonly CtSliceOptions[]): CorpusFiles {
  return Object.fromEntries(
    slices.map((slice, index) => [
      `${String(index).padStart(2, '0')}.dcm`,
      ctSlice({ number: index + 1, ...slice }),
    ]),
  );
}

const at = (...zs: readonly number[]): readonly CtSliceOptions[] => zs.map((z) => ({ z }));
const position = (value: readonly number[]): WriteElement => ({ tag: 0x00200032, vr: 'DS', value });
const orientation = (value: readonly number[] | string): WriteElement => ({
  tag: 0x00200037,
  vr: 'DS',
  value,
});
const spacing = (value: readonly number[] | string): WriteElement => ({
  tag: 0x00280030,
  vr: 'DS',
  value,
});
const sopClass = (value: string): WriteElement => ({ tag: 0x00080016, vr: 'UI', value });

const UNSCALED = { grid: { pixelSpacingMm: [1, 1], unscaled: true } } as const;

/** Rows 82 to 88: series and geometry. */
export const SERIES: readonly CorpusRow[] = [
  {
    row: 82,
    section: 'E',
    title: 'A localizer in the series',
    outcome: 'Left out as a localizer, by its Image Type or because it stands across the slices.',
    cases: [
      {
        name: 'by its Image Type',
        verdict: 'SKIP',
        code: 'localizer',
        image: {},
        build: () =>
          files(...at(0, 1, 2), {
            change: change({
              tag: 0x00080008,
              vr: 'CS',
              value: ['ORIGINAL', 'PRIMARY', 'LOCALIZER'],
            }),
          }),
      },
      {
        name: 'by its geometry alone',
        verdict: 'SKIP',
        code: 'localizer',
        image: {},
        build: () => files(...at(0, 1, 2, 3), { change: change(orientation([0, 1, 0, 0, 0, -1])) }),
      },
    ],
  },
  {
    row: 83,
    section: 'E',
    title: 'Dose report, SR, presentation state, key objects, segmentation, PDF in the study',
    outcome: 'Left out and counted by kind.',
    cases: (
      [
        ['dose report', '1.2.840.10008.5.1.4.1.1.88.67'],
        ['structured report', '1.2.840.10008.5.1.4.1.1.88.33'],
        ['presentation state', '1.2.840.10008.5.1.4.1.1.11.1'],
        ['key object selection', '1.2.840.10008.5.1.4.1.1.88.59'],
        ['segmentation', '1.2.840.10008.5.1.4.1.1.66.4'],
        ['encapsulated PDF', '1.2.840.10008.5.1.4.1.1.104.1'],
        ['secondary capture', '1.2.840.10008.5.1.4.1.1.7'],
      ] as const
    ).map(([name, uid]) => ({
      name,
      verdict: 'SKIP' as const,
      code: 'not-a-ct-image',
      image: {},
      build: () => files(...at(0, 1), { change: change(sopClass(uid)) }),
    })) as unknown as CorpusRow['cases'],
  },
  {
    row: 84,
    section: 'E',
    title: 'Mixed orientations, matrix sizes or spacings in one series',
    outcome: 'Split into stacks.',
    cases: [
      {
        name: 'orientations',
        verdict: 'READ+',
        code: 'split-series',
        build: () =>
          files(
            ...at(0, 1, 2),
            ...[0, 1, 2].map((x) => ({
              change: change(position([x, 0, 0]), orientation([0, 1, 0, 0, 0, -1])),
            })),
          ),
      },
      {
        name: 'matrix sizes',
        verdict: 'READ+',
        code: 'split-series',
        build: () => files(...at(0, 1), { z: 2, rows: 5, columns: 4 }),
      },
      {
        name: 'spacings',
        verdict: 'READ+',
        code: 'split-series',
        build: () => files(...at(0, 1), { z: 2, change: change(spacing([0.25, 0.25])) }),
      },
    ],
  },
  {
    row: 85,
    section: 'E',
    title: 'Gantry tilt',
    outcome: 'Read; the tilt is measured from the positions, never taken from its tag.',
    cases: [
      {
        name: 'a sheared stack whose tilt tag says 0',
        verdict: 'READ+',
        code: 'tilted',
        build: () =>
          files(
            ...[0, 1, 2].map((z) => ({
              change: change(position([0, z * Math.tan(Math.PI / 12), z]), {
                tag: 0x00181120,
                vr: 'DS',
                value: 0,
              }),
            })),
          ),
      },
      {
        name: 'an upright stack whose tilt tag says 15',
        verdict: 'READ',
        build: () =>
          files(
            ...[0, 1, 2].map((z) => ({
              z,
              change: change({ tag: 0x00181120, vr: 'DS', value: 15 }),
            })),
          ),
      },
    ],
  },
  {
    row: 86,
    section: 'E',
    title:
      'Missing slices, uneven spacing, thickness that is not the spacing, bad instance numbers',
    outcome: 'Read; positions alone count, gaps are drawn.',
    cases: [
      {
        name: 'missing slices',
        verdict: 'READ+',
        code: 'missing-slices',
        build: () => files(...at(0, 1, 2, 5, 6)),
      },
      {
        name: 'uneven spacing',
        verdict: 'READ+',
        code: 'uneven-spacing',
        build: () => files(...at(0, 1, 2, 3.2, 4.2)),
      },
      {
        name: 'rounded positions',
        verdict: 'READ',
        build: () => files(...at(0, 0.333, 0.667, 1, 1.333)),
      },
      {
        name: 'thickness 2 mm at every millimetre',
        verdict: 'READ',
        build: () =>
          files(
            ...[0, 1, 2].map((z) => ({
              z,
              change: change({ tag: 0x00180050, vr: 'DS', value: 2 }),
            })),
          ),
      },
      {
        name: 'one instance number for all',
        verdict: 'READ+',
        code: 'instance-numbers',
        build: () =>
          files(
            ...[2, 0, 1].map((z) => ({
              z,
              change: change({ tag: 0x00200013, vr: 'IS', value: 1 }),
            })),
          ),
      },
    ],
  },
  {
    row: 87,
    section: 'E',
    title: 'Several acquisitions or phases under one Series UID',
    outcome:
      'Split by what the files state; not stacked when nothing tells repeated positions apart.',
    cases: [
      ...(
        [
          ['acquisition number', { tag: 0x00200012, vr: 'IS' }, 1, 2],
          ['phase', { tag: 0x00209241, vr: 'FL' }, 40, 75],
          ['trigger time', { tag: 0x00181060, vr: 'DS' }, 310, 620],
          ['acquisition time', { tag: 0x00080032, vr: 'TM' }, '120000', '120512'],
          ['temporal position', { tag: 0x00200100, vr: 'IS' }, 1, 2],
        ] as const
      ).map(([name, element, first, second]) => ({
        name: `told apart by ${name}`,
        verdict: 'READ+' as const,
        code: 'split-series',
        build: () =>
          files(
            ...[0, 1, 2].flatMap((z) =>
              [first, second].map((value) => ({
                z,
                change: change({ ...element, value } as WriteElement),
              })),
            ),
          ),
      })),
      {
        name: 'nothing to tell them apart',
        verdict: 'REFUSE',
        code: 'repeated-positions',
        build: () => files(...at(0, 0, 1, 1, 2, 2)),
      },
    ] as unknown as CorpusRow['cases'],
  },
  {
    row: 88,
    section: 'E',
    title: 'Geometry missing or impossible, UIDs stripped, two patients, two frames of reference',
    outcome:
      'Directions within 1e-3 are put right; otherwise a slice without position or orientation is left out. Without a pixel spacing it is shown pixel by pixel: no scale, nothing measured, part of no pair. Slices without UIDs are grouped by folder and header. Patients are never mixed.',
    cases: [
      ...(
        [
          ['no position', 0x00200032],
          ['no orientation', 0x00200037],
        ] as const
      ).map(([name, tag]) => ({
        name,
        verdict: 'REFUSE' as const,
        code: 'no-geometry',
        build: () => files({ change: without(tag) }),
      })),
      {
        name: 'no pixel spacing',
        verdict: 'REFUSE',
        code: 'no-pixel-spacing',
        build: () => files({ change: without(0x00280030) }),
        image: UNSCALED,
      },
      {
        name: 'imager spacing is no pixel spacing',
        verdict: 'REFUSE',
        code: 'no-pixel-spacing',
        image: UNSCALED,
        build: () =>
          files({
            change: {
              ...without(0x00280030),
              ...change({ tag: 0x00181164, vr: 'DS', value: [0.5, 0.5] }),
            },
          }),
      },
      ...(
        [
          ['empty pixel spacing', spacing('')],
          ['pixel spacing zero', spacing([0, 0.5])],
        ] as const
      ).map(([name, element]) => ({
        name,
        verdict: 'REFUSE' as const,
        code: 'no-pixel-spacing',
        build: () => files({ change: change(element) }),
        image: UNSCALED,
      })),
      {
        name: 'some slices without a pixel spacing are a stack of their own',
        verdict: 'REFUSE',
        code: 'no-pixel-spacing',
        build: () => files(...at(0, 1), { z: 2, change: without(0x00280030) }),
        image: { grid: { pixelSpacingMm: [0.5, 0.25] } },
      },
      ...([['an orientation of five numbers', orientation([1, 0, 0, 0, 1])]] as const).map(
        ([name, element]) => ({
          name,
          verdict: 'REFUSE' as const,
          code: 'no-geometry',
          build: () => files({ change: change(element) }),
        }),
      ),
      ...(
        [
          ['not unit vectors', [2, 0, 0, 0, 1, 0]],
          ['not at a right angle', [1, 0, 0, 0.1, 0.995, 0]],
          ['parallel vectors', [1, 0, 0, 1, 0, 0]],
          ['zero vectors', [0, 0, 0, 0, 0, 0]],
        ] as const
      ).map(([name, value]) => ({
        name,
        verdict: 'REFUSE' as const,
        code: 'bad-orientation',
        build: () => files({ change: change(orientation(value)) }),
      })),
      {
        name: 'vectors off by less than 1e-3',
        verdict: 'READ+',
        code: 'orientation-mended',
        build: () => files({ change: change(orientation([1, 0, 0, 0.0005, 1, 0])) }),
        image: { grid: { rowDirection: [1, 0, 0], columnDirection: [0, 1, 0] } },
      },
      {
        name: 'row spacing comes first',
        verdict: 'READ',
        build: () => files({ change: change(spacing([0.75, 0.5])) }),
        image: { grid: { pixelSpacingMm: [0.75, 0.5] } },
      },
      {
        name: 'no UID at all',
        verdict: 'READ+',
        code: 'no-uid',
        build: () =>
          files(
            ...[0, 1, 2].map((z) => ({
              z,
              change: without(0x00080018, 0x0020000d, 0x0020000e),
            })),
          ),
      },
      {
        name: 'two patients in a folder, under one Series UID',
        verdict: 'READ+',
        code: 'split-series',
        build: () =>
          files(...at(0, 1), {
            z: 2,
            change: change({ tag: 0x00100020, vr: 'LO', value: 'C-2' }),
          }),
      },
      {
        name: 'two frames of reference in a series',
        verdict: 'READ+',
        code: 'split-series',
        build: () =>
          files(...at(0, 1), {
            z: 2,
            change: change({ tag: 0x00200052, vr: 'UI', value: `${CORPUS_ROOT}.77` }),
          }),
      },
    ] as unknown as CorpusRow['cases'],
  },
];
