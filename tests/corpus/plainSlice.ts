import type { CtImage } from '../../core/dicom/index.js';
import type { PartOf, RowCase } from './row.js';

/** What the plain slice of the corpus says, however it is wrapped: position, spacing, encoding, HU, texts. */
export const PLAIN_IMAGE: PartOf<CtImage> = {
  sopInstanceUid: '2.25.77001.2.1.1',
  instanceNumber: 1,
  identity: { patientName: 'Corpus^Synthetic', patientId: 'C-1', studyInstanceUid: '2.25.77001.1' },
  acquisition: {
    seriesInstanceUid: '2.25.77001.2.1',
    seriesNumber: 3,
    kernelLabel: 'Plain',
    thicknessMm: 0.6,
  },
  grid: {
    positionMm: [-10, -20, 0],
    rowDirection: [1, 0, 0],
    columnDirection: [0, 1, 0],
    pixelSpacingMm: [0.5, 0.25],
    rows: 4,
    columns: 5,
  },
  pixels: {
    bitsAllocated: 16,
    bitsStored: 16,
    highBit: 15,
    signed: true,
    rescale: { slope: 1, intercept: -1024 },
    unit: 'HU',
  },
};

/** Its stored values, row after row. */
export const PLAIN_STORED: readonly number[] = Array.from(
  { length: 20 },
  (_, index) => 1000 + index,
);

/** A case that has to come out as the plain slice does. */
export function plainRead(name: string, build: () => Uint8Array): RowCase {
  return {
    name,
    verdict: 'READ',
    build: () => ({ slice: build() }),
    image: PLAIN_IMAGE,
    stored: PLAIN_STORED,
  };
}

/** The same, with a finding. */
export function plainWithFinding(name: string, code: string, build: () => Uint8Array): RowCase {
  return { ...plainRead(name, build), verdict: 'READ+', code };
}

/** One file that is left out. */
export function leftOut(
  verdict: 'SKIP' | 'REFUSE',
  name: string,
  code: string,
  says: string,
  build: () => Uint8Array,
): RowCase {
  return { name, verdict, code, says, build: () => ({ file: build() }) };
}
