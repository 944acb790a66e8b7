import type { Refusal } from '../result.js';
import type { CtImage } from './ctImage.js';
import type { DataSet } from './dataSet.js';
import { hasPreamble, NOT_DICOM, openDataSet } from './openDataSet.js';
import { type ImageFile, readImages } from './readImage.js';
import { TRANSFER_SYNTAX } from './uids.js';

/** What the beginning of a file tells: its CT slices, no slice and why, or that more of the file is needed. */
export type HeaderReading =
  | { readonly kind: 'image'; readonly images: readonly [CtImage, ...CtImage[]] }
  | { readonly kind: 'leftOut'; readonly code: string; readonly text: string }
  | { readonly kind: 'needMore' };

/** Enough of compressed Pixel Data to hold the head of its first code stream, bytes. */
const CODE_STREAM_HEAD = 512;

/**
 * Reads a file's header from its first bytes.
 *
 * @param bytes the beginning of the file; 8 KiB is enough for most
 * @param fileSize the size of the whole file, bytes
 */
export function readHeader(bytes: Uint8Array, fileSize: number): HeaderReading {
  const whole = bytes.length >= fileSize;
  const leftOut = ({ code, text }: Refusal): HeaderReading => ({ kind: 'leftOut', code, text });
  if (fileSize === 0) {
    return leftOut({ code: 'empty-file', text: 'Empty file: it holds no bytes.' });
  }
  if (bytes.length < 132 && !whole) return { kind: 'needMore' };
  const dataSet = openDataSet(bytes);
  if (!dataSet.ok) {
    if (dataSet.refusal.code === NOT_DICOM.refusal.code) return leftOut(dataSet.refusal);
    if (!whole) return { kind: 'needMore' };
    return leftOut(hasPreamble(bytes) ? dataSet.refusal : NOT_DICOM.refusal);
  }
  const { pixelData } = dataSet.value;
  const file = readImages(dataSet.value);
  if (!file.ok) {
    const saysAnotherKind = file.refusal.code === 'not-a-ct-image';
    const mayGoOn = !whole && !saysAnotherKind && pixelData === undefined;
    return mayGoOn ? { kind: 'needMore' } : leftOut(file.refusal);
  }
  const headEnds = (pixelData?.offset ?? 0) + CODE_STREAM_HEAD;
  if (file.value.inFragments) {
    if (!whole && headEnds > bytes.length) return { kind: 'needMore' };
    return { kind: 'image', images: file.value.images };
  }
  const size = isDeflated(file.value) ? dataSet.value.bytes.length : fileSize;
  const end = nativeEnd(dataSet.value, file.value);
  if (end > size) {
    return leftOut({
      code: 'cut-pixels',
      text: `The file ends at byte ${size}; its pixels go on to byte ${end}.`,
    });
  }
  return { kind: 'image', images: file.value.images };
}

function isDeflated({ images }: ImageFile): boolean {
  return images[0].transferSyntaxUid === TRANSFER_SYNTAX.deflated;
}

function nativeEnd({ pixelData }: DataSet, { images }: ImageFile): number {
  const { rows, columns } = images[0].grid;
  return (pixelData?.offset ?? 0) + rows * columns * 2 * images.length;
}
