import { type Result, refuse, success } from '../result.js';
import type { Codecs } from './compressed/codecs.js';
import { decodeFrame } from './compressed/decodeFrame.js';
import { frameBytes, readFragments } from './compressed/fragments.js';
import type { CtImage } from './ctImage.js';
import type { DataSet } from './dataSet.js';
import { openDataSet } from './openDataSet.js';
import { type ImageFile, readImages } from './readImage.js';
import { type StoredValues, storedValues } from './storedValues.js';
import { transferSyntaxInWords } from './uids.js';

/** A CT slice with its stored values, rows × columns, row after row. */
export interface DecodedImage {
  readonly image: CtImage;
  readonly stored: StoredValues;
}

export interface DecodeOptions {
  /** Frame of a multi-frame image, from 0. */
  readonly frame?: number | undefined;
  /** Decoders of the host; without them compressed pixels are refused. */
  readonly codecs?: Codecs | undefined;
}

/** Reads a whole CT image file: its header and the pixels of one frame. */
export async function decodeImage(
  bytes: Uint8Array,
  { frame = 0, codecs }: DecodeOptions = {},
): Promise<Result<DecodedImage>> {
  const dataSet = openDataSet(bytes);
  if (!dataSet.ok) return dataSet;
  const file = readImages(dataSet.value);
  if (!file.ok) return file;
  const image = file.value.images[frame];
  if (image === undefined) {
    return refuse('frame-missing', `The file has no frame ${frame + 1}.`);
  }
  const stored = file.value.inFragments
    ? await decodeCompressed(dataSet.value, file.value, image, frame, codecs)
    : decodeNative(dataSet.value, image, frame);
  return stored.ok ? success({ image, stored: stored.value }) : stored;
}

function decodeNative(
  { bytes, pixelData, littleEndian }: DataSet,
  image: CtImage,
  frame: number,
): Result<StoredValues> {
  const size = image.grid.rows * image.grid.columns * 2;
  const start = (pixelData?.offset ?? 0) + frame * size;
  if (start + size > bytes.length) {
    return refuse(
      'cut-pixels',
      `The file ends at byte ${bytes.length}; its pixels go on to byte ${start + size}.`,
    );
  }
  return success(storedValues(bytes.subarray(start, start + size), image.pixels, !littleEndian));
}

async function decodeCompressed(
  { bytes, pixelData }: DataSet,
  { images }: ImageFile,
  image: CtImage,
  frame: number,
  codecs: Codecs | undefined,
): Promise<Result<StoredValues>> {
  if (codecs === undefined) {
    return refuse(
      'no-decoder',
      `There is no decoder for ${transferSyntaxInWords(image.transferSyntaxUid)} here.`,
    );
  }
  const fragments = readFragments(bytes, pixelData?.offset ?? 0);
  if (!fragments.ok) return fragments;
  const coded = frameBytes(fragments.value, frame, images.length);
  if (!coded.ok) return coded;
  return decodeFrame(coded.value, image.grid, image.pixels, image.transferSyntaxUid, codecs);
}
