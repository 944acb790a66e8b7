import type { Finding, Refusal } from '../result.js';
import type { CtImage } from './ctImage.js';
import type { DataSet } from './dataSet.js';
import { frameRemarks } from './frameRemarks.js';
import { isDeflated } from './locateFrames.js';
import { hasPreamble, isFinalRefusal, NOT_DICOM, openDataSet } from './openDataSet.js';
import { type ImageFile, type ReadOptions, readImages } from './readImage.js';

/** What the beginning of a file tells: its CT slices, no slice and why, or that more of the file is needed. */
export type HeaderReading =
  | {
      readonly kind: 'image';
      readonly images: readonly [CtImage, ...CtImage[]];
      /** Frames of the file that are no slices, and why. */
      readonly leftOut?: readonly Finding[];
    }
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
export function readHeader(
  bytes: Uint8Array,
  fileSize: number,
  options: ReadOptions = {},
): HeaderReading {
  const whole = bytes.length >= fileSize;
  const leftOut = ({ code, text }: Refusal): HeaderReading => ({ kind: 'leftOut', code, text });
  if (fileSize === 0) {
    return leftOut({ code: 'empty-file', text: 'Empty file: it holds no bytes.' });
  }
  if (bytes.length < 132 && !whole) return { kind: 'needMore' };
  const dataSet = openDataSet(bytes);
  if (!dataSet.ok) {
    if (isFinalRefusal(dataSet.refusal.code)) return leftOut(dataSet.refusal);
    if (!whole) return { kind: 'needMore' };
    return leftOut(hasPreamble(bytes) ? dataSet.refusal : NOT_DICOM.refusal);
  }
  const { pixelData } = dataSet.value;
  const file = readImages(dataSet.value, options);
  if (!file.ok) {
    const saysAnotherKind = file.refusal.code === 'not-a-ct-image';
    const mayGoOn = !whole && !saysAnotherKind && pixelData === undefined;
    return mayGoOn ? { kind: 'needMore' } : leftOut(file.refusal);
  }
  if (file.value.inFragments) {
    if (!whole && codeStreamHeadEnds(dataSet.value) > bytes.length) return { kind: 'needMore' };
    return imageReading(file.value);
  }
  const size = isDeflated(file.value) ? dataSet.value.bytes.length : fileSize;
  return withinFile(dataSet.value, file.value, size);
}

function imageReading({ images, leftOut }: Pick<ImageFile, 'images' | 'leftOut'>): HeaderReading {
  return { kind: 'image', images, ...(leftOut.length > 0 && { leftOut }) };
}

/** End of what the head of the first code stream may need, behind an offset table of any length. */
function codeStreamHeadEnds({ bytes, pixelData }: DataSet): number {
  const at = pixelData?.offset ?? 0;
  if (at + 8 > bytes.length) return at + CODE_STREAM_HEAD;
  const table = new DataView(bytes.buffer, bytes.byteOffset, bytes.length).getUint32(at + 4, true);
  return at + table + CODE_STREAM_HEAD;
}

/** Native frames that the file ends before are left out; those before the cut are whole. */
function withinFile({ pixelData }: DataSet, file: ImageFile, size: number): HeaderReading {
  const { rows, columns } = file.images[0].grid;
  const start = pixelData?.offset ?? 0;
  const frameBytes = rows * columns * 2;
  const endOf = ({ frame = 0 }: CtImage): number => start + (frame + 1) * frameBytes;
  const [first, ...rest] = file.images.filter((image) => endOf(image) <= size);
  const cut = file.images.filter((image) => endOf(image) > size);
  const end = cut.reduce((most, image) => Math.max(most, endOf(image)), 0);
  const text = `The file ends at byte ${size}; its pixels go on to byte ${end}.`;
  if (first === undefined) return { kind: 'leftOut', code: 'cut-pixels', text };
  const remarks = frameRemarks();
  for (const { frame = 0 } of cut) remarks.add(frame, { code: 'cut-pixels', text });
  return imageReading({
    images: [first, ...rest],
    leftOut: [...file.leftOut, ...remarks.findings()],
  });
}
