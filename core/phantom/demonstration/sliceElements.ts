import type { WriteElement } from '../../dicom/write/index.js';
import { firstPixelMm, pixelMm } from '../imageGrid.js';
import {
  type DemonstrationOptions,
  demonstrationGrid,
  FIELD_OF_VIEW_MM,
  KERNELS,
  KVP,
  PHASE_PERCENT,
  SCAN,
  SIDES,
  type Side,
  SLICE_SPACING_MM,
  SLICE_THICKNESS_MM,
  sliceZMm,
} from './acquisition.js';
import { identifiersOf } from './identifiers.js';

/** Stored value = HU + 1024. */
export const RESCALE_INTERCEPT = -1024;
export const SYNTHETIC_STATEMENT =
  'SYNTHETIC: computed from geometric shapes, not a patient, not clinical evidence';

const DATE = '20260110';

/** The elements of one CT image (PS3.3 A.3) of the demonstration. `stored` are its pixels, row after row. */
export function sliceElements(
  options: DemonstrationOptions,
  side: Side,
  index: number,
  stored: Uint16Array,
): readonly WriteElement[] {
  return [
    ...identityElements(),
    ...acquisitionElements(side),
    ...frameElements(options, side, index),
    ...pixelElements(options, stored),
  ];
}

function identityElements(): readonly WriteElement[] {
  return [
    { tag: 0x00080005, vr: 'CS', value: 'ISO_IR 192' },
    { tag: 0x00080020, vr: 'DA', value: DATE },
    { tag: 0x00080030, vr: 'TM', value: '104200' },
    { tag: 0x00080050, vr: 'SH', value: '' },
    { tag: 0x00080090, vr: 'PN', value: '' },
    { tag: 0x00081030, vr: 'LO', value: 'SYNTHETIC heart with contrast' },
    { tag: 0x00100010, vr: 'PN', value: 'Synthetic^Rowan Alder' },
    { tag: 0x00100020, vr: 'LO', value: 'SYNTHETIC-01' },
    { tag: 0x00100030, vr: 'DA', value: '' },
    { tag: 0x00100040, vr: 'CS', value: 'O' },
    { tag: 0x00104000, vr: 'LT', value: SYNTHETIC_STATEMENT },
    { tag: 0x00200010, vr: 'SH', value: 'SYNTHETIC' },
  ];
}

function acquisitionElements(side: Side): readonly WriteElement[] {
  return [
    { tag: 0x00080021, vr: 'DA', value: DATE },
    { tag: 0x00080022, vr: 'DA', value: DATE },
    { tag: 0x00080031, vr: 'TM', value: side === 'soft' ? '104300' : '104330' },
    { tag: 0x00080032, vr: 'TM', value: '104210' },
    { tag: 0x00080060, vr: 'CS', value: 'CT' },
    { tag: 0x00080070, vr: 'LO', value: 'Diptych (synthetic)' },
    { tag: 0x0008103e, vr: 'LO', value: `SYNTHETIC heart ${PHASE_PERCENT} % ${side}` },
    { tag: 0x00081090, vr: 'LO', value: 'Computed phantom' },
    { tag: 0x00180010, vr: 'LO', value: 'SYNTHETIC' },
    { tag: 0x00180015, vr: 'CS', value: 'HEART' },
    { tag: 0x00180050, vr: 'DS', value: SLICE_THICKNESS_MM },
    { tag: 0x00180060, vr: 'DS', value: KVP },
    { tag: 0x00180088, vr: 'DS', value: SLICE_SPACING_MM },
    { tag: 0x00180090, vr: 'DS', value: SCAN.detectors * SCAN.pitchMm },
    { tag: 0x00181020, vr: 'LO', value: 'diptych-phantom 1' },
    { tag: 0x00181030, vr: 'LO', value: 'SYNTHETIC' },
    { tag: 0x00181100, vr: 'DS', value: FIELD_OF_VIEW_MM },
    { tag: 0x00181120, vr: 'DS', value: 0 },
    { tag: 0x00181210, vr: 'SH', value: KERNELS[side].label },
    { tag: 0x00185100, vr: 'CS', value: 'HFS' },
    { tag: 0x00200011, vr: 'IS', value: 3 + SIDES.indexOf(side) },
    { tag: 0x00200012, vr: 'IS', value: 2 },
    { tag: 0x00209241, vr: 'FL', value: PHASE_PERCENT },
  ];
}

function frameElements(
  options: DemonstrationOptions,
  side: Side,
  index: number,
): readonly WriteElement[] {
  const ids = identifiersOf(options);
  const grid = demonstrationGrid(options.matrix);
  const z = sliceZMm(options.slices, index);
  const { apodisation, cutOffPerMm } = KERNELS[side];
  return [
    { tag: 0x00080008, vr: 'CS', value: ['DERIVED', 'SECONDARY', 'AXIAL'] },
    { tag: 0x00080012, vr: 'DA', value: DATE },
    { tag: 0x00080013, vr: 'TM', value: '104400' },
    { tag: 0x00080016, vr: 'UI', value: '1.2.840.10008.5.1.4.1.1.2' },
    { tag: 0x00080018, vr: 'UI', value: ids.sopInstanceUid(side, index) },
    { tag: 0x00080023, vr: 'DA', value: DATE },
    { tag: 0x00080033, vr: 'TM', value: '104400' },
    {
      tag: 0x00082111,
      vr: 'ST',
      value: `${SYNTHETIC_STATEMENT}. Filtered back projection, ${apodisation} to ${cutOffPerMm} per mm`,
    },
    { tag: 0x00083010, vr: 'UI', value: ids.irradiationEventUid },
    { tag: 0x0020000d, vr: 'UI', value: ids.studyInstanceUid },
    { tag: 0x0020000e, vr: 'UI', value: ids.seriesInstanceUid(side) },
    { tag: 0x00200013, vr: 'IS', value: index + 1 },
    { tag: 0x00200032, vr: 'DS', value: [...firstPixelMm(grid), z] },
    { tag: 0x00200037, vr: 'DS', value: [1, 0, 0, 0, 1, 0] },
    { tag: 0x00200052, vr: 'UI', value: ids.frameOfReferenceUid },
    { tag: 0x00201040, vr: 'LO', value: '' },
    { tag: 0x00201041, vr: 'DS', value: z },
    { tag: 0x00204000, vr: 'LT', value: SYNTHETIC_STATEMENT },
    { tag: 0x00280030, vr: 'DS', value: [pixelMm(grid), pixelMm(grid)] },
  ];
}

function pixelElements(
  { matrix }: DemonstrationOptions,
  stored: Uint16Array,
): readonly WriteElement[] {
  return [
    { tag: 0x00280002, vr: 'US', value: 1 },
    { tag: 0x00280004, vr: 'CS', value: 'MONOCHROME2' },
    { tag: 0x00280010, vr: 'US', value: matrix },
    { tag: 0x00280011, vr: 'US', value: matrix },
    { tag: 0x00280100, vr: 'US', value: 16 },
    { tag: 0x00280101, vr: 'US', value: 16 },
    { tag: 0x00280102, vr: 'US', value: 15 },
    { tag: 0x00280103, vr: 'US', value: 0 },
    { tag: 0x00280301, vr: 'CS', value: 'NO' },
    { tag: 0x00281050, vr: 'DS', value: [300, 300] },
    { tag: 0x00281051, vr: 'DS', value: [1200, 700] },
    { tag: 0x00281052, vr: 'DS', value: RESCALE_INTERCEPT },
    { tag: 0x00281053, vr: 'DS', value: 1 },
    { tag: 0x00281054, vr: 'LO', value: 'HU' },
    { tag: 0x00281055, vr: 'LO', value: ['Stent and calcium', 'Vessels'] },
    { tag: 0x7fe00010, vr: 'OW', value: stored },
  ];
}
