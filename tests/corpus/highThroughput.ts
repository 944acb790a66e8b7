import { createRequire } from 'node:module';

/** The encoder of the same package as the decoder: Debian has none, so this makes round trips and no independent checks. */
interface Encoder {
  getDecodedBuffer(info: object): Uint8Array;
  getEncodedBuffer(): Uint8Array;
  setQuality(reversible: boolean, step: number): void;
  encode(): void;
  delete(): void;
}

/** Signed 16-bit values as an HTJ2K code stream, without loss. */
export async function highThroughput(
  stored: Int16Array,
  columns: number,
  rows: number,
): Promise<Uint8Array> {
  const create = createRequire(import.meta.url)('@cornerstonejs/codec-openjph/wasmjs');
  const { HTJ2KEncoder } = await create({ print: () => {}, printErr: () => {} });
  const encoder: Encoder = new HTJ2KEncoder();
  const info = {
    width: columns,
    height: rows,
    bitsPerSample: 16,
    componentCount: 1,
    isSigned: true,
    isUsingColorTransform: false,
  };
  encoder.getDecodedBuffer(info).set(new Uint8Array(stored.buffer));
  encoder.setQuality(true, 0);
  encoder.encode();
  const coded = encoder.getEncodedBuffer().slice();
  encoder.delete();
  return coded;
}
