import type { CtImage } from '../dicom/index.js';
import type { Finding } from '../result.js';

/** One slice of a stack: the image and the file that holds it. */
export interface StackSlice {
  /** The file's number in the index of its folder; the page asks for its bytes by this number. */
  readonly fileId: number;
  /** Path relative to the opened folder, with '/' between names. For people; never opened by the page. */
  readonly file: string;
  readonly image: CtImage;
  /** Position along the stack's normal, mm. */
  readonly alongMm: number;
}

/**
 * Slices of one orientation and one grid that make one volume, ordered by position along the normal
 * (row direction × column direction), ascending.
 */
export interface Stack {
  /** Unique inside a folder and the same at each reading of it: Series Instance UID, and '#n' where a series splits. */
  readonly key: string;
  readonly slices: readonly [StackSlice, ...StackSlice[]];
  /** Usual distance between neighbouring slices, mm (the median); undefined for a single slice. */
  readonly sliceSpacingMm?: number;
  /** Unit of its values: HU, another unit as the file gives it, or 'stored'. */
  readonly unit: string;
  readonly findings: readonly Finding[];
  /** Values below it are taken as padding, because the reader chose so; absent where nothing was chosen. */
  readonly maskedBelowHu?: number;
}

/** A file that is no part of any stack, and why. */
export interface LeftOut {
  readonly file: string;
  readonly code: string;
  readonly text: string;
}

/** What a folder holds. */
export interface FolderIndex {
  readonly files: number;
  readonly stacks: readonly Stack[];
  readonly leftOut: readonly LeftOut[];
}
