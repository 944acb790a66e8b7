import { execFileSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, it } from 'vitest';
import { type DecodedImage, decodeImage } from '../../core/dicom/index.js';
import { pixelToPatient } from '../../core/geometry/index.js';
import { rescaled, storedToHu } from '../../core/intensity/index.js';
import { regionValues, type Shape, statistics } from '../../core/region/index.js';

// CT_small.dcm of pydicom 2.3.1, as Debian's python3-pydicom ships it. The figures were computed with numpy.
const CT_SMALL = '/usr/lib/python3/dist-packages/pydicom/data/test_files/CT_small.dcm';

async function decode(path: string): Promise<DecodedImage> {
  const decoded = await decodeImage(new Uint8Array(readFileSync(path)));
  if (!decoded.ok) throw new Error(decoded.refusal.text);
  return decoded.value;
}

describe.skipIf(!existsSync(CT_SMALL))(
  'CT_small.dcm (skipped without python3-pydicom)',
  async () => {
    const { image, stored } = existsSync(CT_SMALL) ? await decode(CT_SMALL) : ({} as DecodedImage);
    const at = (row: number, column: number): number => stored[row * 128 + column] ?? Number.NaN;

    it('has the stored values and HU of numpy', () => {
      const hu = statistics(Float64Array.from(stored, (value) => rescaled(value, image.pixels)));
      expect([Math.min(...stored), Math.max(...stored)]).toEqual([128, 2191]);
      expect(Array.from(stored).reduce((sum, value) => sum + value, 0)).toBe(14826310);
      expect(hu.mean).toBeCloseTo(-119.0738525391, 9);
      expect(hu.sd).toBeCloseTo(379.76859014, 8);
      expect([hu.min, hu.max]).toEqual([-896, 1167]);
    });

    it('has each pixel where numpy has it', () => {
      const places: readonly (readonly [number, number, number, number])[] = [
        [0, 0, 175, -849],
        [0, 1, 180, -844],
        [1, 0, 186, -838],
        [64, 64, 1928, 904],
        [127, 127, 909, -115],
        [10, 100, 1227, 203],
      ];
      for (const [row, column, value, hu] of places) {
        expect(at(row, column)).toBe(value);
        expect(storedToHu(at(row, column), image.pixels)).toBe(hu);
      }
    });

    it('has the patient position of its corners (PS3.3 C.7.6.2.1.1)', () => {
      const right = pixelToPatient(image.grid, { column: 127, row: 0 });
      const below = pixelToPatient(image.grid, { column: 0, row: 127 });
      [-74.129367, -179.035797, -75.699997].forEach((value, axis) => {
        expect(right[axis]).toBeCloseTo(value, 5);
      });
      [-158.135803, -95.029361, -75.699997].forEach((value, axis) => {
        expect(below[axis]).toBeCloseTo(value, 5);
      });
    });

    it('measures rows and columns 60 to 69 as numpy does', () => {
      const corner = (row: number, column: number) => pixelToPatient(image.grid, { row, column });
      const shape: Shape = {
        kind: 'outline',
        pointsMm: [corner(60, 60), corner(60, 69), corner(69, 69), corner(69, 60)],
      };
      const slice = { fileId: 0, file: 'CT_small.dcm', image, alongMm: 0 };
      const got = statistics(regionValues(shape, slice, stored).values);
      expect(got.n).toBe(100);
      expect(got.mean).toBeCloseTo(570.34, 10);
      expect(got.sd).toBeCloseTo(257.875321, 6);
      expect([got.min, got.max]).toEqual([-11, 1167]);
    });

    it('keeps kernel, exposure time and window as absent or present as the file has them', () => {
      expect(image.windows).toEqual([]);
      expect(image.pixels.padding).toEqual({ low: -2000, high: -2000 });
      expect(image.pixels.unit).toBe('HU');
      expect(image.acquisition.phasePercent).toBeUndefined();
      expect(image.acquisition.kvp).toBe(120);
    });
  },
);

const hasDcmtk = existsSync('/usr/bin/dcmconv');

describe.skipIf(!hasDcmtk || !existsSync(CT_SMALL))(
  'the encodings that dcmtk writes (skipped without dcmtk)',
  () => {
    const folder = mkdtempSync(join(tmpdir(), 'diptych-encodings-'));
    afterAll(() => rmSync(folder, { recursive: true, force: true }));

    it.each([
      ['implicit little endian', '+ti'],
      ['explicit little endian', '+te'],
      ['explicit big endian', '+tb'],
      ['deflated', '+td'],
    ])('reads %s bit for bit', async (name, flag) => {
      const file = join(folder, `${name}.dcm`);
      execFileSync('/usr/bin/dcmconv', [flag, CT_SMALL, file]);
      const expected = await decode(CT_SMALL);
      const got = await decode(file);
      expect(
        Buffer.compare(Buffer.from(got.stored.buffer), Buffer.from(expected.stored.buffer)),
      ).toBe(0);
      expect(got.image.grid).toEqual(expected.image.grid);
      expect(got.image.identity).toEqual(expected.image.identity);
    });
  },
);
