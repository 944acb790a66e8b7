import { describe, expect, it } from 'vitest';
import { nodeCodecs } from '../../app/host/codecs/nodeCodecs.js';
import { decodeImage, readHeader } from '../../core/dicom/index.js';
import { ctSlice } from '../corpus/ctSlice.js';
import { highThroughput } from '../corpus/highThroughput.js';

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
    const file = fileOf(await highThroughput(stored, columns, rows));
    expect(readHeader(file, file.length).kind).toBe('image');
    const decoded = await decodeImage(file, { codecs: nodeCodecs });
    if (!decoded.ok) throw new Error(decoded.refusal.text);
    expect(Array.from(decoded.value.stored)).toEqual(Array.from(stored));
    expect(decoded.value.image.acquisition.lossy).toBe(false);
  });

  it('is refused when its code stream is cut, and never grey', async () => {
    const coded = await highThroughput(stored, columns, rows);
    const decoded = await decodeImage(fileOf(coded.slice(0, coded.length >> 1)), {
      codecs: nodeCodecs,
    });
    expect(decoded.ok).toBe(false);
  });
});
