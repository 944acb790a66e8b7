import type { StoredValues } from '../../../core/dicom/index.js';
import type { ReadSlice } from '../../../core/pairing/contract.js';
import { firstPixelMm, type ImageGrid, pixelMm } from '../../../core/phantom/index.js';
import type { Stack, StackSlice } from '../../../core/stack/index.js';

/** An image of one slice, HU row after row, and its height. */
export interface ImageSlice {
  readonly zMm: number;
  readonly hu: Float64Array;
}

/** A stack of images that were never files, with the reader of its slices. */
export interface ImageStack {
  readonly stack: Stack;
  readonly stored: readonly StoredValues[];
}

const INTERCEPT = -1024;

/** Axial slices of one grid as a stack, stored as whole numbers as a file would. */
export function imageStack(
  key: string,
  grid: ImageGrid,
  slices: readonly ImageSlice[],
  { thicknessMm = 0.6, lossy = false } = {},
): ImageStack {
  const [x, y] = firstPixelMm(grid);
  const placed = slices.map(
    ({ zMm }, index): StackSlice => ({
      fileId: index,
      file: `${key}/${index}`,
      alongMm: zMm,
      image: {
        sopClassUid: '1.2.840.10008.5.1.4.1.1.2',
        sopInstanceUid: `2.25.${index}`,
        transferSyntaxUid: '1.2.840.10008.1.2.1',
        imageType: ['DERIVED', 'PRIMARY', 'AXIAL'],
        synthetic: true,
        identity: { studyInstanceUid: '2.25.1' },
        acquisition: { seriesInstanceUid: key, thicknessMm, lossy },
        grid: {
          positionMm: [x, y, zMm],
          rowDirection: [1, 0, 0],
          columnDirection: [0, 1, 0],
          pixelSpacingMm: [pixelMm(grid), pixelMm(grid)],
          rows: grid.matrix,
          columns: grid.matrix,
        },
        pixels: {
          bitsAllocated: 16,
          bitsStored: 16,
          highBit: 15,
          signed: true,
          photometric: 'MONOCHROME2',
          unit: 'HU',
          rescale: { slope: 1, intercept: INTERCEPT },
        },
        windows: [],
        findings: [],
      },
    }),
  );
  const [first, ...rest] = placed;
  if (first === undefined) throw new RangeError('no slices in a stack');
  const step = (rest[0]?.alongMm ?? first.alongMm) - first.alongMm;
  return {
    stack: {
      key,
      slices: [first, ...rest],
      ...(rest.length > 0 && { sliceSpacingMm: step }),
      unit: 'HU',
      findings: [],
    },
    stored: slices.map(({ hu }) => Int16Array.from(hu, (value) => Math.round(value - INTERCEPT))),
  };
}

/** Reads slices of these stacks from memory. */
export function readFrom(...stacks: readonly ImageStack[]): ReadSlice {
  return async (stack, sliceIndex) => stacks.find((one) => one.stack === stack)?.stored[sliceIndex];
}
