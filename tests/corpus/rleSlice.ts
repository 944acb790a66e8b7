import { ctSlice } from './ctSlice.js';
import { concat, u32 } from './rawBytes.js';

/** The plain slice in RLE (PS3.5 G): high bytes, then low bytes, each as one run of 20 literal bytes. */
export function rleSlice(): Uint8Array {
  const values = Array.from({ length: 20 }, (_, index) => 1000 + index);
  const high = concat(
    [19],
    values.map((value) => value >> 8),
    [0x80],
  );
  const low = concat(
    [19],
    values.map((value) => value & 0xff),
    [0x80],
  );
  const head = new Uint8Array(64);
  head.set(concat(u32(2), u32(64), u32(64 + high.length)));
  return ctSlice({
    transferSyntaxUid: '1.2.840.10008.1.2.5',
    change: {
      2145386512: { tag: 0x7fe00010, vr: 'OB', fragments: [concat(head, high, low)] },
    },
  });
}
