import { type Result, refuse, success } from '../result.js';
import type { CtImage } from './ctImage.js';
import { openDataSet } from './openDataSet.js';
import { pixelDataPlace, readImage } from './readImage.js';
import { type StoredValues, storedValues } from './storedValues.js';
import { TRANSFER_SYNTAX } from './uids.js';

/** A CT slice with its stored values, rows × columns, row after row. */
export interface DecodedImage {
  readonly image: CtImage;
  readonly stored: StoredValues;
}

/** Reads a whole CT image file: its header and its pixels. */
export function decodeImage(bytes: Uint8Array): Result<DecodedImage> {
  const dataSet = openDataSet(bytes);
  if (!dataSet.ok) return dataSet;
  const image = readImage(dataSet.value);
  if (!image.ok) return image;
  const { start, end } = pixelDataPlace(dataSet.value, image.value);
  const { bytes: source } = dataSet.value;
  if (end > source.length) {
    return refuse(
      'cut-pixels',
      `The file ends at byte ${source.length}; its pixels go on to byte ${end}.`,
    );
  }
  const bigEndian = image.value.transferSyntaxUid === TRANSFER_SYNTAX.explicitBigEndian;
  return success({
    image: image.value,
    stored: storedValues(source.subarray(start, end), image.value.pixels, bigEndian),
  });
}
