import { deflateRawSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { decodeImage, readHeader } from '../../../../core/dicom/index.js';
import { CORPUS_ROOT, ctSlice } from '../../../corpus/ctSlice.js';

const SYNTAXES = {
  'implicit little endian': { transferSyntaxUid: '1.2.840.10008.1.2' },
  'explicit little endian': { transferSyntaxUid: '1.2.840.10008.1.2.1' },
  'explicit big endian': { transferSyntaxUid: '1.2.840.10008.1.2.2' },
  deflated: {
    transferSyntaxUid: '1.2.840.10008.1.2.1.99',
    deflate: (bytes: Uint8Array) => new Uint8Array(deflateRawSync(bytes)),
  },
};

describe('decodeImage', () => {
  it.each(Object.entries(SYNTAXES))('reads the same slice from %s', async (_, options) => {
    const decoded = await decodeImage(ctSlice({ ...options, z: 12.5 }));
    if (!decoded.ok) throw new Error(decoded.refusal.text);
    const { image, stored } = decoded.value;
    expect([...stored]).toEqual(Array.from({ length: 20 }, (_, index) => 1000 + index));
    expect(image.grid).toEqual({
      positionMm: [-10, -20, 12.5],
      rowDirection: [1, 0, 0],
      columnDirection: [0, 1, 0],
      pixelSpacingMm: [0.5, 0.25],
      rows: 4,
      columns: 5,
    });
    expect(image.pixels).toEqual({
      bitsAllocated: 16,
      bitsStored: 16,
      highBit: 15,
      signed: true,
      photometric: 'MONOCHROME2',
      rescale: { slope: 1, intercept: -1024 },
      unit: 'HU',
    });
    expect(image.synthetic).toBe(true);
    expect(image.acquisition).toEqual({
      seriesInstanceUid: `${CORPUS_ROOT}.2.1`,
      seriesNumber: 3,
      seriesDescription: 'synthetic corpus',
      frameOfReferenceUid: `${CORPUS_ROOT}.1.9`,
      kernelLabel: 'Plain',
      thicknessMm: 0.6,
      lossy: false,
    });
  });

  it('keeps negative stored values of 12 bits and drops what stands in the other bits', async () => {
    // -1 and -2048 in 12 bits with dirty high bits, PS3.5 8.1.1.
    const decoded = await decodeImage(
      ctSlice({
        rows: 1,
        columns: 2,
        stored: Uint16Array.of(0x5fff, 0x3800),
        change: {
          2621697: { tag: 0x00280101, vr: 'US', value: 12 },
          2621698: { tag: 0x00280102, vr: 'US', value: 11 },
        },
      }),
    );
    expect(decoded.ok && [...decoded.value.stored]).toEqual([-1, -2048]);
  });

  it('shifts stored bits down when the high bit is not bits stored − 1', async () => {
    const decoded = await decodeImage(
      ctSlice({
        rows: 1,
        columns: 1,
        signed: false,
        stored: Uint16Array.of(0xabc0),
        change: {
          2621697: { tag: 0x00280101, vr: 'US', value: 12 },
          2621698: { tag: 0x00280102, vr: 'US', value: 15 },
        },
      }),
    );
    expect(decoded.ok && [...decoded.value.stored]).toEqual([0xabc]);
  });
});

describe('readHeader', () => {
  const file = ctSlice({ rows: 64, columns: 64, stored: new Int16Array(64 * 64) });

  it('says that an empty file is empty', () => {
    expect(readHeader(new Uint8Array(0), 0)).toEqual({
      kind: 'leftOut',
      code: 'empty-file',
      text: 'Empty file: it holds no bytes.',
    });
  });

  it('says that a text file is not DICOM', () => {
    const text = new TextEncoder().encode('a note to nobody\n'.repeat(20));
    expect(readHeader(text, text.length)).toMatchObject({ kind: 'leftOut', code: 'not-dicom' });
  });

  it('needs no more than the beginning of a file', () => {
    expect(readHeader(file.subarray(0, 2048), file.length)).toMatchObject({ kind: 'image' });
  });

  it('asks for more wherever the beginning is cut before the pixels', () => {
    const pixelsAt = file.length - 64 * 64 * 2;
    for (let cut = 0; cut < pixelsAt; cut++) {
      expect(readHeader(file.subarray(0, cut), file.length).kind).toBe('needMore');
    }
  });

  it.each([
    ['implicit little endian', '1.2.840.10008.1.2'],
    ['explicit big endian', '1.2.840.10008.1.2.2'],
  ])('leaves out a file of %s that is cut anywhere, and says where', (_, transferSyntaxUid) => {
    const whole = ctSlice({ transferSyntaxUid });
    for (let size = 1; size < whole.length; size++) {
      const reading = readHeader(whole.subarray(0, size), size);
      expect(reading.kind, `cut at ${size}`).toBe('leftOut');
    }
  });

  it('names the tag in which a cut file ends', () => {
    const said = (size: number) => readHeader(file.subarray(0, size), size);
    const inName = Buffer.from(file).indexOf('Corpus^Synthetic') + 3;
    expect(said(inName)).toEqual({
      kind: 'leftOut',
      code: 'cut-header',
      text: `The file ends at byte ${inName}, inside (0010,0010).`,
    });
    expect(said(700)).toEqual({
      kind: 'leftOut',
      code: 'cut-header',
      text: 'The file ends at byte 700, right after (0028,0100).',
    });
  });

  it('leaves out a file whose pixels are cut', () => {
    const size = file.length - 10;
    expect(readHeader(file.subarray(0, 2048), size)).toMatchObject({
      kind: 'leftOut',
      code: 'cut-pixels',
    });
  });

  it.each([
    ['JPEG extended, 12 bit (1.2.840.10008.1.2.4.51)', '1.2.840.10008.1.2.4.51'],
    ['MPEG-2 video (1.2.840.10008.1.2.4.100)', '1.2.840.10008.1.2.4.100'],
  ])('refuses an encoding without a decoder by name: %s', (name, transferSyntaxUid) => {
    expect(readHeader(ctSlice({ transferSyntaxUid }), 1e6)).toEqual({
      kind: 'leftOut',
      code: 'unsupported-transfer-syntax',
      text: `An encoding that can't be read: ${name}.`,
    });
  });

  it.each([
    [
      'a localizer',
      'localizer',
      { tag: 0x00080008, vr: 'CS', value: ['ORIGINAL', 'PRIMARY', 'LOCALIZER'] },
    ],
    [
      'another kind of object',
      'not-a-ct-image',
      { tag: 0x00080016, vr: 'UI', value: '1.2.840.10008.5.1.4.1.1.88.33' },
    ],
    ['a colour image', 'not-a-ct-slice', { tag: 0x00280002, vr: 'US', value: 3 }],
    ['a position of text', 'no-geometry', { tag: 0x00200032, vr: 'DS', value: ['a', 'b', 'c'] }],
    [
      'slanted direction cosines',
      'bad-orientation',
      { tag: 0x00200037, vr: 'DS', value: [1, 0, 0, 0.1, 1, 0] },
    ],
  ] as const)('leaves out %s', (_, code, element) => {
    const bytes = ctSlice({ change: { [element.tag]: element } });
    expect(readHeader(bytes, bytes.length)).toMatchObject({ kind: 'leftOut', code });
  });

  it.each([
    ['no', ''],
    ['zero', [0, 0]],
    ['one', [0.5]],
    ['negative', [-0.5, 0.5]],
  ])('takes a slice with %s pixel spacing as unscaled, and says so', (_, value) => {
    const bytes = ctSlice({ change: { 2621488: { tag: 0x00280030, vr: 'DS', value } } });
    const reading = readHeader(bytes, bytes.length);
    if (reading.kind !== 'image') throw new Error(`not an image: ${reading.kind}`);
    const [{ grid, findings }] = reading.images;
    expect([grid.unscaled, grid.pixelSpacingMm]).toEqual([true, [1, 1]]);
    expect(findings.map(({ code }) => code)).toEqual(['no-pixel-spacing']);
  });

  it.each([
    ['no rescale', 'stored', 'no-rescale', { 2625618: undefined }],
    ['slope zero', 'stored', 'bad-rescale', { 2625619: { tag: 0x00281053, vr: 'DS', value: 0 } }],
    ['another unit', 'US', 'not-hu', { 2625620: { tag: 0x00281054, vr: 'LO', value: 'US' } }],
  ] as const)('gives no HU with %s, and says so', (_, unit, code, change) => {
    const bytes = ctSlice({ change });
    const reading = readHeader(bytes, bytes.length);
    expect(reading.kind === 'image' && reading.images[0].pixels.unit).toBe(unit);
    expect(reading.kind === 'image' && reading.images[0].findings.map((f) => f.code)).toEqual([
      code,
    ]);
  });
});
