import { describe, expect, it } from 'vitest';
import type { PixelEncoding } from '../../../../core/dicom/index.js';
import { windowed } from '../../../../core/intensity/index.js';
import { greyTable, mapGreys } from '../../../../renderer/plates/greyTables.js';

const PIXELS: PixelEncoding = {
  bitsAllocated: 16,
  bitsStored: 16,
  highBit: 15,
  signed: true,
  photometric: 'MONOCHROME2',
  rescale: { slope: 1, intercept: -1024 },
  unit: 'HU',
};
const WINDOW = { centre: 40, width: 400, function: 'LINEAR' } as const;

describe('mapGreys', () => {
  it.each([1, 2, 3, 4, 5, 1023])('writes each of %d pixels as PS3.3 has it, opaque', (count) => {
    const stored = Int16Array.from(
      { length: count },
      (_, index) => -3000 + ((index * 7919) % 6000),
    );
    const target = new Uint32Array(count);
    mapGreys(stored, greyTable(PIXELS, WINDOW), target);
    const expected = Array.from(stored, (value) => {
      const grey = Math.round(windowed(value - 1024, WINDOW));
      return (0xff000000 | (grey * 0x010101)) >>> 0;
    });
    expect(Array.from(target)).toEqual(expected);
  });
});
