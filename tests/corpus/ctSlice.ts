import {
  type WriteElement,
  type WriteFileOptions,
  writeFile,
} from '../../core/dicom/write/index.js';

/** A small synthetic CT slice; every attribute can be replaced, added or, with undefined, left out. */
export interface CtSliceOptions extends WriteFileOptions {
  readonly rows?: number;
  readonly columns?: number;
  /** Stored values, rows × columns; by default 1000 + index. */
  readonly stored?: Int16Array | Uint16Array;
  readonly signed?: boolean;
  readonly z?: number;
  readonly number?: number;
  readonly series?: string;
  readonly study?: string;
  /** Elements by tag that replace those of the slice; undefined takes one away. */
  readonly change?: Readonly<Record<number, WriteElement | undefined>>;
}

/** A study's root for generated files: our own, under 2.25 (PS3.5 B.2). */
export const CORPUS_ROOT = '2.25.77001';

/** Bytes of a synthetic CT Image file. */
export function ctSlice(options: CtSliceOptions = {}): Uint8Array {
  return writeFile(ctElements(options), options);
}

/** The elements of {@link ctSlice}, ascending by tag. */
export function ctElements(options: CtSliceOptions = {}): readonly WriteElement[] {
  const { rows = 4, columns = 5, signed = true, z = 0, number = 1 } = options;
  const { series = `${CORPUS_ROOT}.2.1`, study = `${CORPUS_ROOT}.1` } = options;
  const stored =
    options.stored ?? Int16Array.from({ length: rows * columns }, (_, index) => 1000 + index);
  const elements: readonly WriteElement[] = [
    { tag: 0x00080008, vr: 'CS', value: ['DERIVED', 'SECONDARY', 'AXIAL'] },
    { tag: 0x00080016, vr: 'UI', value: '1.2.840.10008.5.1.4.1.1.2' },
    { tag: 0x00080018, vr: 'UI', value: `${series}.${number}` },
    { tag: 0x00080060, vr: 'CS', value: 'CT' },
    { tag: 0x0008103e, vr: 'LO', value: 'synthetic corpus' },
    { tag: 0x00100010, vr: 'PN', value: 'Corpus^Synthetic' },
    { tag: 0x00100020, vr: 'LO', value: 'C-1' },
    { tag: 0x00180050, vr: 'DS', value: 0.6 },
    { tag: 0x00181210, vr: 'SH', value: 'Plain' },
    { tag: 0x0020000d, vr: 'UI', value: study },
    { tag: 0x0020000e, vr: 'UI', value: series },
    { tag: 0x00200011, vr: 'IS', value: 3 },
    { tag: 0x00200013, vr: 'IS', value: number },
    { tag: 0x00200032, vr: 'DS', value: [-10, -20, z] },
    { tag: 0x00200037, vr: 'DS', value: [1, 0, 0, 0, 1, 0] },
    { tag: 0x00200052, vr: 'UI', value: `${study}.9` },
    { tag: 0x00280002, vr: 'US', value: 1 },
    { tag: 0x00280004, vr: 'CS', value: 'MONOCHROME2' },
    { tag: 0x00280010, vr: 'US', value: rows },
    { tag: 0x00280011, vr: 'US', value: columns },
    { tag: 0x00280030, vr: 'DS', value: [0.5, 0.25] },
    { tag: 0x00280100, vr: 'US', value: 16 },
    { tag: 0x00280101, vr: 'US', value: 16 },
    { tag: 0x00280102, vr: 'US', value: 15 },
    { tag: 0x00280103, vr: 'US', value: signed ? 1 : 0 },
    { tag: 0x00281052, vr: 'DS', value: -1024 },
    { tag: 0x00281053, vr: 'DS', value: 1 },
    { tag: 0x7fe00010, vr: 'OW', value: stored },
  ];
  const change = options.change ?? {};
  const kept = elements.filter(({ tag }) => !(tag in change));
  const added = Object.values(change).filter((element) => element !== undefined);
  return [...kept, ...added].sort((a, b) => a.tag - b.tag);
}
