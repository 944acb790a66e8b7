import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { nodeCodecs } from '../../app/host/codecs/nodeCodecs.js';
import { type DecodedImage, decodeImage, readHeader } from '../../core/dicom/index.js';

// CT_small.dcm of pydicom 2.3.1 (Debian's python3-pydicom), encoded by dcmtk and gdcm, which decode independently.
const DATA = '/usr/lib/python3/dist-packages/pydicom/data/test_files';
const CT_SMALL = `${DATA}/CT_small.dcm`;
const hasTools = ['/usr/bin/dcmcjpeg', '/usr/bin/gdcmconv', CT_SMALL].every((path) =>
  existsSync(path),
);

async function decode(path: string): Promise<DecodedImage> {
  const decoded = await decodeImage(new Uint8Array(readFileSync(path)), { codecs: nodeCodecs });
  if (!decoded.ok) throw new Error(decoded.refusal.text);
  return decoded.value;
}

const largestDifference = (a: ArrayLike<number>, b: ArrayLike<number>): number =>
  Array.from(a).reduce((most, value, i) => Math.max(most, Math.abs(value - (b[i] ?? 0))), 0);

describe.skipIf(!hasTools)('compressed frames (skipped without dcmtk, gdcm and pydicom)', () => {
  const folder = mkdtempSync(join(tmpdir(), 'diptych-compressed-'));
  afterAll(() => rmSync(folder, { recursive: true, force: true }));
  let expected: DecodedImage;
  beforeAll(async () => {
    expected = await decode(CT_SMALL);
  });

  const LOSSLESS: readonly (readonly [string, string, string, readonly string[]])[] = [
    ['JPEG lossless SV1 by dcmtk', '1.2.840.10008.1.2.4.70', 'dcmcjpeg', ['+e1']],
    ['JPEG lossless SV1 by gdcm', '1.2.840.10008.1.2.4.70', 'gdcmconv', ['--jpeg']],
    ['JPEG lossless process 14 by dcmtk', '1.2.840.10008.1.2.4.57', 'dcmcjpeg', ['+el']],
    ...[1, 2, 3, 4, 5, 7].map(
      (predictor) =>
        [
          `JPEG lossless predictor ${predictor} by dcmtk`,
          '1.2.840.10008.1.2.4.57',
          'dcmcjpeg',
          ['+el', '+sv', String(predictor)],
        ] as const,
    ),
    ['JPEG-LS by dcmtk', '1.2.840.10008.1.2.4.80', 'dcmcjpls', ['+el']],
    ['JPEG-LS by gdcm', '1.2.840.10008.1.2.4.80', 'gdcmconv', ['--jpegls']],
    ['JPEG 2000 lossless by gdcm', '1.2.840.10008.1.2.4.90', 'gdcmconv', ['--j2k']],
    ['RLE by dcmtk', '1.2.840.10008.1.2.5', 'dcmcrle', []],
    ['RLE by gdcm', '1.2.840.10008.1.2.5', 'gdcmconv', ['--rle']],
  ];

  it.each(LOSSLESS)('%s is bit-exact and not marked lossy', async (name, syntax, tool, flags) => {
    const file = join(folder, `${name}.dcm`);
    execFileSync(`/usr/bin/${tool}`, [...flags, CT_SMALL, file], { stdio: 'ignore' });
    const got = await decode(file);
    expect(got.image.transferSyntaxUid).toBe(syntax);
    expect(largestDifference(got.stored, expected.stored)).toBe(0);
    expect(got.image.acquisition.lossy).toBe(false);
    expect(got.image.grid).toEqual(expected.image.grid);
  });

  it.each(LOSSLESS)('%s, cut anywhere in its pixels, is refused and never grey', async (name) => {
    const whole = new Uint8Array(readFileSync(join(folder, `${name}.dcm`)));
    for (const part of [0.3, 0.6, 0.95]) {
      const cut = whole.subarray(0, Math.floor(whole.length * part));
      const decoded = await decodeImage(cut, { codecs: nodeCodecs });
      expect(decoded.ok, `cut to ${part}`).toBe(false);
    }
  });

  it.each([
    ['irreversible JPEG 2000', ['-K', '-Y', '--irreversible', '-r', '1.8'], 3],
    ['near-lossless JPEG-LS', ['-L', '-Y', '-e', '2'], 2],
  ] as const)(
    'reads %s of gdcm near the original and marks it lossy',
    async (name, flags, most) => {
      const file = join(folder, `${name}.dcm`);
      execFileSync('/usr/bin/gdcmconv', [...flags, CT_SMALL, file], { stdio: 'ignore' });
      const got = await decode(file);
      expect(got.image.acquisition.lossy).toBe(true);
      expect(got.image.findings.map((finding) => finding.code)).toContain('lossy');
      const difference = largestDifference(got.stored, expected.stored);
      expect(difference).toBeGreaterThan(0);
      expect(difference).toBeLessThanOrEqual(most);
      const native = join(folder, `${name} native.dcm`);
      execFileSync('/usr/bin/gdcmconv', ['-w', file, native], { stdio: 'ignore' });
      expect(largestDifference(got.stored, (await decode(native)).stored)).toBeLessThanOrEqual(1);
    },
  );

  it('refuses JPEG lossless with a point transform, which its decoder would read wrongly', async () => {
    const file = join(folder, 'point transform.dcm');
    execFileSync('/usr/bin/dcmcjpeg', ['+el', '+pt', '2', CT_SMALL, file], { stdio: 'ignore' });
    const decoded = await decodeImage(new Uint8Array(readFileSync(file)), { codecs: nodeCodecs });
    expect(!decoded.ok && decoded.refusal.code).toBe('unsupported-transfer-syntax');
  });

  it('has the sign of the header where an unsigned JPEG 2000 stream carries signed words', async () => {
    // J2K_pixelrep_mismatch.dcm: pydicom gives −2000 … 1896.
    const got = await decode(`${DATA}/J2K_pixelrep_mismatch.dcm`);
    const values = Array.from(got.stored);
    const low = values.reduce((least, value) => Math.min(least, value), Infinity);
    const high = values.reduce((most, value) => Math.max(most, value), -Infinity);
    expect([low, high]).toEqual([-2000, 1896]);
  });

  it('marks a lossy JPEG 2000 file of an archive', async () => {
    const got = await decode(`${DATA}/693_J2KI.dcm`);
    expect(got.image.acquisition.lossy).toBe(true);
    expect(Array.from(got.stored).reduce((least, value) => Math.min(least, value), 0)).toBe(-2971);
  });

  it('finds a compressed image from the beginning of its file', () => {
    const bytes = new Uint8Array(readFileSync(join(folder, 'JPEG-LS by dcmtk.dcm')));
    expect(readHeader(bytes.subarray(0, 8192), bytes.length).kind).toBe('image');
  });
});
