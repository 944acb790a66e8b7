import type { Refusal } from '../result.js';
import type { CtImage } from './ctImage.js';
import { hasPreamble, NOT_DICOM, openDataSet } from './openDataSet.js';
import { pixelDataPlace, readImage } from './readImage.js';
import { TRANSFER_SYNTAX } from './uids.js';

/** What the beginning of a file tells: a CT slice, no slice and why, or that more of the file is needed. */
export type HeaderReading =
  | { readonly kind: 'image'; readonly image: CtImage }
  | { readonly kind: 'leftOut'; readonly code: string; readonly text: string }
  | { readonly kind: 'needMore' };

/**
 * Reads a file's header from its first bytes.
 *
 * @param bytes the beginning of the file; 8 KiB is enough for most
 * @param fileSize the size of the whole file, bytes
 */
export function readHeader(bytes: Uint8Array, fileSize: number): HeaderReading {
  const whole = bytes.length >= fileSize;
  const leftOut = ({ code, text }: Refusal): HeaderReading => ({ kind: 'leftOut', code, text });
  if (fileSize === 0)
    return leftOut({ code: 'empty-file', text: 'Empty file: it holds no bytes.' });
  if (bytes.length < 132 && !whole) return { kind: 'needMore' };
  const dataSet = openDataSet(bytes);
  if (!dataSet.ok) {
    if (dataSet.refusal.code === NOT_DICOM.refusal.code) return leftOut(dataSet.refusal);
    if (!whole) return { kind: 'needMore' };
    return leftOut(hasPreamble(bytes) ? dataSet.refusal : NOT_DICOM.refusal);
  }
  const image = readImage(dataSet.value);
  if (!image.ok) {
    const saysAnotherKind = image.refusal.code === 'not-a-ct-image';
    const mayGoOn = !whole && !saysAnotherKind && dataSet.value.pixelData === undefined;
    return mayGoOn ? { kind: 'needMore' } : leftOut(image.refusal);
  }
  const deflated = image.value.transferSyntaxUid === TRANSFER_SYNTAX.deflated;
  const size = deflated ? dataSet.value.bytes.length : fileSize;
  const { end } = pixelDataPlace(dataSet.value, image.value);
  if (end > size) {
    return leftOut({
      code: 'cut-pixels',
      text: `The file ends at byte ${size}; its pixels go on to byte ${end}.`,
    });
  }
  return { kind: 'image', image: image.value };
}
