import type { CtImage } from '../dicom/index.js';
import { alongNormal } from '../geometry/index.js';
import type { StoredOf } from '../region/index.js';
import type { Stack, StackSlice } from '../stack/index.js';
import type { StackCut } from './cutStack.js';
import { type Resampling, resamplingInWords } from './resampling.js';
import { type StoredCut, storedOfCut } from './storedOfCut.js';

/** One of the images that a cut was made from. */
export interface SourceImage {
  readonly sopInstanceUid: string;
  /** Frame of a multi-frame image, from 1; null for an image of its own. */
  readonly frameNumber: number | null;
  /** Index from 0 into the stack's ordered slices. */
  readonly sliceIndex: number;
}

/** A cut as a stack of one slice, for all that shows and measures slices. */
export interface CutSlice {
  /** Its key says that it is a cut; its findings say how it was made. */
  readonly stack: Stack;
  /** The stack that was cut. */
  readonly of: Stack;
  readonly stored: StoredCut['stored'];
  readonly storedOf: StoredOf;
  readonly resampling: Resampling;
  /** The lowest and the highest slice that values rest on; null where the cut holds no value. */
  readonly source: { readonly first: SourceImage; readonly last: SourceImage } | null;
}

/**
 * A cut as a stack of one slice with HU in eighths ({@link storedOfCut}). It is an image of no file: it has no SOP Instance
 * UID and no number of its own, and it says that it is derived. Identity, acquisition and windows are those of the slice in
 * the middle of those cut. Its thickness is the slab's; without one it is the slices' own, and in both cases a region counts
 * as lying on it within half of that.
 *
 * Regions, profiles and edges measured on it must carry what {@link measureRegionOnCut} and its like add.
 */
export function asSlice(cut: StackCut): CutSlice {
  const { stack: of, grid, hu, resampling, slices } = cut;
  const { stored, pixels } = storedOfCut(hu);
  const middle = slices === undefined ? 0 : (slices.first + slices.last) >> 1;
  const from = (of.slices[middle] ?? of.slices[0]).image;
  const taken = slices === undefined ? [] : of.slices.slice(slices.first, slices.last + 1);
  const isLossy = taken.some(({ image }) => image.acquisition.lossy);
  const slice: StackSlice = {
    fileId: -1,
    file: '',
    alongMm: alongNormal(grid, grid.positionMm),
    image: { ...imageOf(from, resampling, isLossy), grid, pixels },
  };
  return {
    of,
    stored,
    storedOf: (index) => (index === 0 ? stored : undefined),
    resampling,
    source:
      slices === undefined
        ? null
        : { first: sourceOf(of, slices.first), last: sourceOf(of, slices.last) },
    stack: {
      key: `${of.key}#oblique`,
      slices: [slice],
      unit: 'HU',
      findings: [
        ...of.findings,
        {
          code: 'resampled',
          text: `An oblique cut, resampled by ${resamplingInWords(resampling)}: no slice of the scanner.`,
        },
      ],
      ...(of.maskedBelowHu !== undefined && { maskedBelowHu: of.maskedBelowHu }),
    },
  };
}

function imageOf(from: CtImage, { slabMm }: Resampling, lossy: boolean): CtImage {
  const { frame: _frame, instanceNumber: _number, ...rest } = from;
  return {
    ...rest,
    sopInstanceUid: '',
    imageType: ['DERIVED', 'SECONDARY', 'REFORMATTED'],
    acquisition: { ...from.acquisition, lossy, ...(slabMm !== null && { thicknessMm: slabMm }) },
  };
}

function sourceOf({ slices }: Stack, sliceIndex: number): SourceImage {
  const slice = slices[sliceIndex];
  if (slice === undefined) throw new RangeError(`invalid slice index: ${sliceIndex}`);
  const { sopInstanceUid, frame } = slice.image;
  return { sopInstanceUid, frameNumber: frame === undefined ? null : frame + 1, sliceIndex };
}
