import { createRequire } from 'node:module';
import { describe, expect, it } from 'vitest';
import { nodeCodecs } from '../../app/host/codecs/nodeCodecs.js';
import { decodeImage, readHeader } from '../../core/dicom/index.js';
import { ctSlice } from '../corpus/ctSlice.js';

/** The encoder of the same package as the decoder: Debian has none, so this is a round trip and no independent check. */
interface Encoder {
  getDecodedBuffer(info: object): Uint8Array;
  getEncodedBuffer(): Uint8Array;
  setQuality(reversible: boolean, step: number): void;
  encode(): void;
  delete(): void;
}

async function encode(stored: Int16Array, columns: number, rows: number): Promise<Uint8Array> {
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

describe('HTJ2K, by a round trip through one package', () => {
  const columns = 64;
  const rows = 48;
  const stored = Int16Array.from(
    { length: columns * rows },
    (_, index) => ((index * 7919) % 5000) - 2000,
  );

  const fileOf = (coded: Uint8Array): Uint8Array =>
    ctSlice({
      rows,
      columns,
      transferSyntaxUid: '1.2.840.10008.1.2.4.201',
      change: { 2145386512: { tag: 0x7fe00010, vr: 'OB', fragments: [coded] } },
    });

  it('comes back bit for bit and is not marked lossy', async () => {
    const file = fileOf(await encode(stored, columns, rows));
    expect(readHeader(file, file.length).kind).toBe('image');
    const decoded = await decodeImage(file, { codecs: nodeCodecs });
    if (!decoded.ok) throw new Error(decoded.refusal.text);
    expect(Array.from(decoded.value.stored)).toEqual(Array.from(stored));
    expect(decoded.value.image.acquisition.lossy).toBe(false);
  });

  it('is refused when its code stream is cut, and never grey', async () => {
    const coded = await encode(stored, columns, rows);
    const decoded = await decodeImage(fileOf(coded.slice(0, coded.length >> 1)), {
      codecs: nodeCodecs,
    });
    expect(decoded.ok).toBe(false);
  });
});
