import { type Result, refuse, success } from '../../result.js';

/**
 * RLE of one 16-bit component (PS3.5 Annex G): a header of 64 bytes, then two PackBits segments, the more
 * significant byte first. A segment that gives too few bytes refuses; what it gives too many is padding.
 *
 * @returns the words, `pixels` of them
 */
export function decodeRle(frame: Uint8Array, pixels: number): Result<Uint16Array> {
  const view = new DataView(frame.buffer, frame.byteOffset, frame.length);
  if (frame.length < 64 || view.getUint32(0, true) !== 2) {
    return refuse('rle-damaged', 'RLE pixels can’t be read: two segments are expected.');
  }
  // Two bytes give 128 at most: a frame that can't reach the pixels is told before room is made for them.
  if (frame.length * 64 < pixels) {
    return refuse('cut-pixels', `RLE pixels are cut: ${frame.length} bytes can't hold ${pixels}.`);
  }
  const starts = [view.getUint32(4, true), view.getUint32(8, true)] as const;
  const words = new Uint16Array(pixels);
  const high = unpack(frame, starts[0], starts[1], pixels, (at, byte) => {
    words[at] = byte << 8;
  });
  const low = unpack(frame, starts[1], frame.length, pixels, (at, byte) => {
    words[at] = (words[at] ?? 0) | byte;
  });
  if (high < pixels || low < pixels) {
    return refuse(
      'cut-pixels',
      `RLE pixels are cut: ${Math.min(high, low)} of ${pixels} are there.`,
    );
  }
  return success(words);
}

/** PackBits (PS3.5 G.3.2): n ≥ 0 copies n + 1 bytes, n < 0 repeats one byte 1 − n times, −128 does nothing. */
function unpack(
  bytes: Uint8Array,
  from: number,
  to: number,
  count: number,
  put: (at: number, byte: number) => void,
): number {
  let at = 0;
  let i = from;
  const end = Math.min(to, bytes.length);
  while (i < end && at < count) {
    const control = ((bytes[i++] ?? 0) << 24) >> 24;
    if (control >= 0) {
      for (let n = 0; n <= control && i < end && at < count; n++) put(at++, bytes[i++] ?? 0);
    } else if (control !== -128 && i < end) {
      const byte = bytes[i++] ?? 0;
      for (let n = 0; n < 1 - control && at < count; n++) put(at++, byte);
    }
  }
  return at;
}
