import { describe, expect, it } from 'vitest';
import type { PixelEncoding } from '../../../../core/dicom/index.js';
import {
  displayTable,
  NO_DATA_GREY,
  rescaled,
  storedToHu,
} from '../../../../core/intensity/index.js';

const PIXELS: PixelEncoding = {
  bitsAllocated: 16,
  bitsStored: 16,
  highBit: 15,
  signed: true,
  photometric: 'MONOCHROME2',
  rescale: { slope: 1, intercept: -1024 },
  unit: 'HU',
  padding: { low: -2000, high: -1000 },
};
const WINDOW = { centre: 40, width: 400, function: 'LINEAR' } as const;

describe('displayTable', () => {
  const table = displayTable(PIXELS, WINDOW);

  it('is indexed by stored value and rounds the window’s output', () => {
    // HU 0 and 100 of C 40 W 400: 102.256 and 166.165 (REFERENCES A1, PS3.3 C.11.2.1.2.1).
    expect([table[1024], table[1124], table[0], table[3000]]).toEqual([102, 166, 0, 255]);
  });

  it('draws padding as no data, whatever its sign', () => {
    expect([table[-2000 & 0xffff], table[-1000 & 0xffff], table[-999 & 0xffff]]).toEqual([
      NO_DATA_GREY,
      NO_DATA_GREY,
      0,
    ]);
  });

  it('turns light and dark for MONOCHROME1 and leaves HU alone', () => {
    const turned: PixelEncoding = { ...PIXELS, photometric: 'MONOCHROME1' };
    expect(displayTable(turned, WINDOW)[1024]).toBe(153);
    expect(storedToHu(1024, turned)).toBe(0);
  });
});

describe('storedToHu', () => {
  it('never averages padding: −2000 inside the padding range has no HU', () => {
    expect([-2000, -1500, -1000, -999].map((stored) => storedToHu(stored, PIXELS))).toEqual([
      undefined,
      undefined,
      undefined,
      -2023,
    ]);
  });

  it('has no HU in another unit', () => {
    expect(storedToHu(5, { ...PIXELS, unit: 'stored' })).toBeUndefined();
  });
});

describe('a Modality LUT in place of a rescale (PS3.3 C.11.1.1)', () => {
  const { rescale: _none, padding: _no, ...rest } = PIXELS;
  const pixels: PixelEncoding = {
    ...rest,
    unit: 'stored',
    modalityLut: { firstStored: -1, values: [10, 20, 30] },
  };

  it('gives the first value to all below its table and the last to all above', () => {
    expect([-500, -1, 0, 1, 2, 900].map((stored) => rescaled(stored, pixels))).toEqual([
      10, 10, 20, 30, 30, 30,
    ]);
  });

  it('is what the image is shown through, and gives no HU', () => {
    const full = { centre: 20.5, width: 21, function: 'LINEAR' } as const;
    const table = displayTable(pixels, full);
    expect([table[-1 & 0xffff], table[0], table[1]]).toEqual([0, 128, 255]);
    expect(storedToHu(0, pixels)).toBeUndefined();
  });
});
