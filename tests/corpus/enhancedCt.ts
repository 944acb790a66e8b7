import {
  type WriteElement,
  type WriteFileOptions,
  writeFile,
} from '../../core/dicom/write/index.js';
import { CORPUS_ROOT } from './ctSlice.js';

/** One frame of a synthetic enhanced CT image. */
export interface EnhancedFrame {
  readonly z: number;
  readonly slope?: number;
  readonly intercept?: number;
  readonly phasePercent?: number;
  readonly delayMs?: number;
  readonly kernel?: string;
  readonly acquisitionNumber?: number;
  readonly dateTime?: string;
  readonly type?: string;
  readonly stored?: Int16Array;
}

export interface EnhancedOptions extends WriteFileOptions {
  readonly frames: readonly EnhancedFrame[];
  readonly rows?: number;
  readonly columns?: number;
  readonly series?: string;
  readonly number?: number;
  /** Pixel Data in place of the frames' stored values. */
  readonly pixelData?: WriteElement;
  readonly change?: Readonly<Record<number, WriteElement | undefined>>;
}

const sequence = (tag: number, ...items: readonly WriteElement[][]): WriteElement => ({
  tag,
  vr: 'SQ',
  items,
});

const code = (tag: number, value: string, scheme: string, meaning: string): WriteElement =>
  sequence(tag, [
    { tag: 0x00080100, vr: 'SH', value },
    { tag: 0x00080102, vr: 'SH', value: scheme },
    { tag: 0x00080104, vr: 'LO', value: meaning },
  ]);

/** Stored values of a frame: by default 1000 · (index + 1) + pixel index. */
export function frameValues(index: number, pixels: number): Int16Array {
  return Int16Array.from({ length: pixels }, (_, i) => 1000 * (index + 1) + (i % 500));
}

/**
 * Bytes of a synthetic Enhanced CT Image (PS3.3 A.38.1). Orientation, spacing and the kernel of the first frame are
 * in the shared groups; position, rescale and whatever a frame has of its own are in its own.
 */
export function enhancedCt(options: EnhancedOptions): Uint8Array {
  return writeFile(enhancedElements(options), options);
}

export function enhancedElements({
  frames,
  rows = 4,
  columns = 5,
  series = `${CORPUS_ROOT}.3.1`,
  number = 1,
  pixelData,
  change = {},
}: EnhancedOptions): readonly WriteElement[] {
  const pixels = rows * columns;
  const stored = new Int16Array(pixels * frames.length);
  for (const [index, frame] of frames.entries()) {
    stored.set(frame.stored ?? frameValues(index, pixels), index * pixels);
  }
  const frameType = ['DERIVED', 'PRIMARY', 'VOLUME', 'NONE'];
  const elements: readonly WriteElement[] = [
    { tag: 0x00080008, vr: 'CS', value: frameType },
    { tag: 0x00080016, vr: 'UI', value: '1.2.840.10008.5.1.4.1.1.2.1' },
    { tag: 0x00080018, vr: 'UI', value: `${series}.${number}` },
    { tag: 0x00080020, vr: 'DA', value: '20260101' },
    { tag: 0x00080023, vr: 'DA', value: '20260101' },
    { tag: 0x0008002a, vr: 'DT', value: '20260101120000' },
    { tag: 0x00080030, vr: 'TM', value: '120000' },
    { tag: 0x00080033, vr: 'TM', value: '120000' },
    { tag: 0x00080050, vr: 'SH', value: '' },
    { tag: 0x00080060, vr: 'CS', value: 'CT' },
    { tag: 0x00080070, vr: 'LO', value: 'Synthetic' },
    { tag: 0x00080090, vr: 'PN', value: '' },
    { tag: 0x0008103e, vr: 'LO', value: 'synthetic corpus' },
    { tag: 0x00081090, vr: 'LO', value: 'Corpus' },
    { tag: 0x00089205, vr: 'CS', value: 'MONOCHROME' },
    { tag: 0x00089206, vr: 'CS', value: 'VOLUME' },
    { tag: 0x00089207, vr: 'CS', value: 'NONE' },
    { tag: 0x00100010, vr: 'PN', value: 'Corpus^Synthetic' },
    { tag: 0x00100020, vr: 'LO', value: 'C-1' },
    { tag: 0x00100030, vr: 'DA', value: '' },
    { tag: 0x00100040, vr: 'CS', value: 'O' },
    { tag: 0x00181000, vr: 'LO', value: '1' },
    { tag: 0x00181020, vr: 'LO', value: '1' },
    { tag: 0x00185100, vr: 'CS', value: 'HFS' },
    { tag: 0x00189004, vr: 'CS', value: 'PRODUCT' },
    { tag: 0x00189073, vr: 'FD', value: 300 },
    { tag: 0x0020000d, vr: 'UI', value: `${CORPUS_ROOT}.1` },
    { tag: 0x0020000e, vr: 'UI', value: series },
    { tag: 0x00200010, vr: 'SH', value: '' },
    { tag: 0x00200011, vr: 'IS', value: 5 },
    { tag: 0x00200013, vr: 'IS', value: number },
    { tag: 0x00200052, vr: 'UI', value: `${CORPUS_ROOT}.1.9` },
    { tag: 0x00201040, vr: 'LO', value: '' },
    sequence(0x00209221, [{ tag: 0x00209164, vr: 'UI', value: `${CORPUS_ROOT}.8` }]),
    sequence(0x00209222, [
      { tag: 0x00209164, vr: 'UI', value: `${CORPUS_ROOT}.8` },
      { tag: 0x00209165, vr: 'AT', value: 0x00209057 },
      { tag: 0x00209167, vr: 'AT', value: 0x00209111 },
    ]),
    { tag: 0x00280002, vr: 'US', value: 1 },
    { tag: 0x00280004, vr: 'CS', value: 'MONOCHROME2' },
    { tag: 0x00280008, vr: 'IS', value: frames.length },
    { tag: 0x00280010, vr: 'US', value: rows },
    { tag: 0x00280011, vr: 'US', value: columns },
    { tag: 0x00280100, vr: 'US', value: 16 },
    { tag: 0x00280101, vr: 'US', value: 16 },
    { tag: 0x00280102, vr: 'US', value: 15 },
    { tag: 0x00280103, vr: 'US', value: 1 },
    { tag: 0x00280301, vr: 'CS', value: 'NO' },
    { tag: 0x00282110, vr: 'CS', value: '00' },
    { tag: 0x00400555, vr: 'SQ', items: [] },
    { tag: 0x20500020, vr: 'CS', value: 'IDENTITY' },
    { tag: 0x52009229, vr: 'SQ', items: [sharedGroups(frameType)] },
    { tag: 0x52009230, vr: 'SQ', items: frames.map(frameGroups) },
    pixelData ?? { tag: 0x7fe00010, vr: 'OW', value: stored },
  ];
  const kept = elements.filter(({ tag }) => !(tag in change));
  const added = Object.values(change).filter((element) => element !== undefined);
  return [...kept, ...added].sort((a, b) => a.tag - b.tag);
}

function sharedGroups(frameType: readonly string[]): WriteElement[] {
  return [
    sequence(0x00189301, [
      { tag: 0x00189302, vr: 'CS', value: 'SPIRAL' },
      { tag: 0x00189333, vr: 'CS', value: 'NO' },
      { tag: 0x00189334, vr: 'CS', value: 'NO' },
    ]),
    sequence(0x00189304, [
      { tag: 0x00180090, vr: 'DS', value: 500 },
      { tag: 0x00181120, vr: 'DS', value: 0 },
      { tag: 0x00181130, vr: 'DS', value: 100 },
      { tag: 0x00181140, vr: 'CS', value: 'CW' },
      { tag: 0x00189305, vr: 'FD', value: 0.28 },
      { tag: 0x00189306, vr: 'FD', value: 0.6 },
      { tag: 0x00189307, vr: 'FD', value: 38.4 },
    ]),
    sequence(0x00189308, [
      { tag: 0x00189309, vr: 'FD', value: 10 },
      { tag: 0x00189310, vr: 'FD', value: 10 },
      { tag: 0x00189311, vr: 'FD', value: 0.2 },
    ]),
    sequence(0x00189312, [
      { tag: 0x00181110, vr: 'DS', value: 1000 },
      { tag: 0x00189335, vr: 'FD', value: 570 },
    ]),
    sequence(0x00189314, [
      { tag: 0x00181100, vr: 'DS', value: 180 },
      { tag: 0x00181210, vr: 'SH', value: 'Plain' },
      { tag: 0x00189315, vr: 'CS', value: 'FILTER_BACK_PROJ' },
      { tag: 0x00189316, vr: 'CS', value: 'CONVOLUTION' },
      { tag: 0x00189319, vr: 'FD', value: 180 },
      { tag: 0x00189320, vr: 'SH', value: 'NONE' },
      { tag: 0x00189322, vr: 'FD', value: [0.5, 0.25] },
    ]),
    sequence(0x00189321, [
      { tag: 0x00189323, vr: 'CS', value: 'NONE' },
      { tag: 0x00189328, vr: 'FD', value: 280 },
      { tag: 0x00189330, vr: 'FD', value: 400 },
      { tag: 0x00189332, vr: 'FD', value: 112 },
      { tag: 0x00189345, vr: 'FD', value: 10 },
      code(0x00189346, '113691', 'DCM', 'IEC Body Dosimetry Phantom'),
    ]),
    sequence(0x00189325, [
      { tag: 0x00180060, vr: 'DS', value: 100 },
      { tag: 0x00181160, vr: 'SH', value: 'NONE' },
      { tag: 0x00181190, vr: 'DS', value: 0.9 },
      { tag: 0x00187050, vr: 'CS', value: 'ALUMINUM' },
    ]),
    sequence(0x00189326, [
      { tag: 0x00189313, vr: 'FD', value: [0, 0, 0] },
      { tag: 0x00189318, vr: 'FD', value: [0, 0, 0] },
      { tag: 0x00189327, vr: 'FD', value: 0 },
    ]),
    sequence(0x00189477, [{ tag: 0x00083010, vr: 'UI', value: `${CORPUS_ROOT}.7` }]),
    sequence(0x00189329, [
      { tag: 0x00089007, vr: 'CS', value: frameType },
      { tag: 0x00089205, vr: 'CS', value: 'MONOCHROME' },
      { tag: 0x00089206, vr: 'CS', value: 'VOLUME' },
      { tag: 0x00089207, vr: 'CS', value: 'NONE' },
    ]),
    sequence(0x00209071, [
      code(0x00082218, '80891009', 'SCT', 'Heart'),
      { tag: 0x00209072, vr: 'CS', value: 'U' },
    ]),
    sequence(0x00209116, [{ tag: 0x00200037, vr: 'DS', value: [1, 0, 0, 0, 1, 0] }]),
    sequence(0x00289110, [
      { tag: 0x00180050, vr: 'DS', value: 0.6 },
      { tag: 0x00280030, vr: 'DS', value: [0.5, 0.25] },
    ]),
    sequence(0x00289132, [
      { tag: 0x00281050, vr: 'DS', value: 300 },
      { tag: 0x00281051, vr: 'DS', value: 800 },
    ]),
  ];
}

function frameGroups(frame: EnhancedFrame, index: number): WriteElement[] {
  const { z, slope = 1, intercept = -1024, phasePercent, delayMs, kernel } = frame;
  const type = frame.type;
  return [
    ...(phasePercent === undefined && delayMs === undefined
      ? []
      : [
          sequence(0x00189118, [
            ...(delayMs === undefined
              ? []
              : [{ tag: 0x00209153, vr: 'FD', value: delayMs } as const]),
            ...(phasePercent === undefined
              ? []
              : [{ tag: 0x00209241, vr: 'FL', value: phasePercent } as const]),
          ]),
        ]),
    ...(kernel === undefined
      ? []
      : [sequence(0x00189314, [{ tag: 0x00181210, vr: 'SH', value: kernel }])]),
    ...(type === undefined
      ? []
      : [
          sequence(0x00189329, [
            { tag: 0x00089007, vr: 'CS', value: ['ORIGINAL', 'PRIMARY', type, 'NONE'] },
          ]),
        ]),
    sequence(
      0x00209111,
      [
        { tag: 0x00189074, vr: 'DT', value: frame.dateTime ?? '20260101120000' },
        { tag: 0x00189151, vr: 'DT', value: '20260101120000' },
        { tag: 0x00189220, vr: 'FD', value: 100 },
        { tag: 0x00209057, vr: 'UL', value: index + 1 },
        { tag: 0x00209056, vr: 'SH', value: '1' },
        { tag: 0x00209156, vr: 'US', value: frame.acquisitionNumber ?? 1 },
        { tag: 0x00209157, vr: 'UL', value: index + 1 },
      ].sort((a, b) => a.tag - b.tag) as WriteElement[],
    ),
    sequence(0x00209113, [{ tag: 0x00200032, vr: 'DS', value: [-10, -20, z] }]),
    sequence(0x00289145, [
      { tag: 0x00281052, vr: 'DS', value: intercept },
      { tag: 0x00281053, vr: 'DS', value: slope },
      { tag: 0x00281054, vr: 'LO', value: 'HU' },
    ]),
  ];
}
