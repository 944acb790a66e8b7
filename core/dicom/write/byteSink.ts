/** Bytes in the making: grows as needed, numbers in one byte order. */
export interface ByteSink {
  readonly u16: (value: number) => void;
  readonly u32: (value: number) => void;
  readonly bytes: (value: Uint8Array) => void;
  readonly take: () => Uint8Array;
}

export function byteSink(littleEndian: boolean): ByteSink {
  let buffer = new Uint8Array(1024);
  let view = new DataView(buffer.buffer);
  let length = 0;
  const room = (count: number): number => {
    if (length + count > buffer.length) {
      const larger = new Uint8Array(Math.max(buffer.length * 2, length + count));
      larger.set(buffer.subarray(0, length));
      buffer = larger;
      view = new DataView(buffer.buffer);
    }
    const at = length;
    length += count;
    return at;
  };
  // The place is taken before the view is read: taking it may replace the view.
  return {
    u16: (value) => {
      const at = room(2);
      view.setUint16(at, value, littleEndian);
    },
    u32: (value) => {
      const at = room(4);
      view.setUint32(at, value, littleEndian);
    },
    bytes: (value) => {
      const at = room(value.length);
      buffer.set(value, at);
    },
    take: () => buffer.slice(0, length),
  };
}
