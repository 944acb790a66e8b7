import type { CtImage } from '../dicom/index.js';

/** A CT slice and the file that holds it. */
export interface IndexedImage {
  readonly fileId: number;
  /** Path relative to the opened folder, '/' between names. */
  readonly file: string;
  readonly image: CtImage;
  /** Tells its pixels from others; needed only where two slices have one SOP Instance UID. */
  readonly pixelDigest?: string;
}

/** The folder of a file; '' for the opened folder itself. */
export function folderOf({ file }: Pick<IndexedImage, 'file'>): string {
  return file.slice(0, Math.max(0, file.lastIndexOf('/')));
}
