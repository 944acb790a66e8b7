import type { PixelEncoding } from './ctImage.js';

/** Stored values of one slice, row after row: what the rescale and the padding are defined on. */
export type StoredValues = Int16Array | Uint16Array;

/**
 * Native 16-bit Pixel Data as stored values: byte order, the stored bits cut out, and their sign extended
 * (PS3.5 8.1.1, PS3.3 C.7.6.3.1). Bits outside the stored ones may hold anything and are dropped.
 *
 * @param bytes exactly 2 bytes a pixel
 */
export function storedValues(
  bytes: Uint8Array,
  pixels: PixelEncoding,
  bigEndian: boolean,
): StoredValues {
  const count = bytes.length >> 1;
  const raw = new Uint16Array(count);
  if (bigEndian === HOST_IS_BIG_ENDIAN) {
    new Uint8Array(raw.buffer).set(bytes.subarray(0, count * 2));
  } else {
    const view = new DataView(bytes.buffer, bytes.byteOffset, count * 2);
    for (let i = 0; i < count; i++) raw[i] = view.getUint16(i * 2, !bigEndian);
  }
  return extractStoredBits(raw, pixels);
}

const HOST_IS_BIG_ENDIAN = new Uint8Array(new Uint16Array([1]).buffer)[0] === 0;

/** Cuts the stored bits out of 16-bit words, in place, and extends the sign. */
export function extractStoredBits(words: Uint16Array, pixels: PixelEncoding): StoredValues {
  const { bitsStored, highBit, signed } = pixels;
  const shiftUp = 15 - highBit;
  const shiftDown = 16 - bitsStored;
  if (!signed) {
    if (shiftUp === 0 && shiftDown === 0) return words;
    for (let i = 0; i < words.length; i++) {
      words[i] = (((words[i] ?? 0) << shiftUp) & 0xffff) >>> shiftDown;
    }
    return words;
  }
  const values = new Int16Array(words.buffer);
  if (shiftUp === 0 && shiftDown === 0) return values;
  for (let i = 0; i < values.length; i++) {
    values[i] = (((values[i] ?? 0) << (shiftUp + 16)) >> 16) >> shiftDown;
  }
  return values;
}
