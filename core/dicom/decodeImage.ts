import { unmarkedPadding } from '../intensity/unmarkedPadding.js';
import { type Result, refuse, success } from '../result.js';
import type { Codecs } from './compressed/codecs.js';
import type { FramePlaces } from './compressed/framesOfFragments.js';
import type { CtImage } from './ctImage.js';
import { decodeFrameBytes } from './decodeFrameBytes.js';
import { locateFrames, walkBytes } from './locateFrames.js';
import { openDataSet } from './openDataSet.js';
import { readImages } from './readImage.js';
import type { StoredValues } from './storedValues.js';

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
  const image = file.value.images.find((one) => (one.frame ?? 0) === frame);
  if (image === undefined) {
    return refuse('frame-missing', `The file has no frame ${frame + 1}.`);
  }
  const { bytes: content } = dataSet.value;
  const located = walkBytes(locateFrames(dataSet.value, file.value, content.length), content);
  if (!located.ok) return located;
  const places = located.value[frame];
  if (places === undefined) throw new RangeError(`no places for frame: ${frame}`);
  if (!places.ok) return places;
  const stored = await decodeFrameBytes(joinPlaces(content, places.value), image, codecs);
  if (!stored.ok) return stored;
  const unmarked = unmarkedPadding(stored.value, image.pixels);
  const findings = unmarked === undefined ? image.findings : [...image.findings, unmarked];
  return success({ image: { ...image, findings }, stored: stored.value });
}

/** The bytes of places, one after the other; a view where there is but one. */
export function joinPlaces(bytes: Uint8Array, places: FramePlaces): Uint8Array {
  const parts = places.map(({ offset, length }) => bytes.subarray(offset, offset + length));
  const [only] = parts;
  if (parts.length === 1 && only !== undefined) return only;
  const whole = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}
