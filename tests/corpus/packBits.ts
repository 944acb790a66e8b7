/**
 * One 16-bit component as RLE (PS3.5 Annex G), every byte a literal; `pad` bytes follow each segment, as some writers
 * leave them.
 */
export function rleFrame(words: Uint16Array | Int16Array, pad = 0): Uint8Array {
  const segments = [8, 0].map((shift) => literals(words, shift, pad));
  const [high, low] = segments;
  if (high === undefined || low === undefined) throw new RangeError('no segments');
  const frame = new Uint8Array(64 + high.length + low.length);
  const view = new DataView(frame.buffer);
  view.setUint32(0, 2, true);
  view.setUint32(4, 64, true);
  view.setUint32(8, 64 + high.length, true);
  frame.set(high, 64);
  frame.set(low, 64 + high.length);
  return frame;
}

function literals(words: Uint16Array | Int16Array, shift: number, pad: number): Uint8Array {
  const bytes: number[] = [];
  for (let at = 0; at < words.length; at += 128) {
    const part = words.subarray(at, at + 128);
    bytes.push(part.length - 1);
    for (const word of part) bytes.push((word >> shift) & 0xff);
  }
  for (let i = 0; i < pad; i++) bytes.push(0);
  return Uint8Array.from(bytes);
}
