/** Bytes and reader of each binary number (PS3.5 table 6.2-1). */
const READERS: Readonly<
  Record<string, readonly [number, (view: DataView, at: number, little: boolean) => number]>
> = {
  US: [2, (view, at, little) => view.getUint16(at, little)],
  SS: [2, (view, at, little) => view.getInt16(at, little)],
  UL: [4, (view, at, little) => view.getUint32(at, little)],
  SL: [4, (view, at, little) => view.getInt32(at, little)],
  UV: [8, (view, at, little) => Number(view.getBigUint64(at, little))],
  SV: [8, (view, at, little) => Number(view.getBigInt64(at, little))],
  FL: [4, (view, at, little) => view.getFloat32(at, little)],
  FD: [8, (view, at, little) => view.getFloat64(at, little)],
};

/** True for the value representations of binary numbers. */
export function isBinaryNumber(vr: string): boolean {
  return vr in READERS;
}

/**
 * The numbers of a value that the file writes in another value representation than the standard: Rows as UL, Pixel
 * Spacing as FD. Bytes that make no whole number are left out.
 */
export function binaryNumbers(value: Uint8Array, vr: string, littleEndian: boolean): number[] {
  const reader = READERS[vr];
  if (reader === undefined) throw new RangeError(`no binary number: ${vr}`);
  const [size, read] = reader;
  const view = new DataView(value.buffer, value.byteOffset, value.length);
  return Array.from({ length: Math.floor(value.length / size) }, (_, index) =>
    read(view, index * size, littleEndian),
  );
}
