import { deflateRawSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { inflateRaw } from '../../../core/dicom/inflate.js';
import { openDataSet } from '../../../core/dicom/openDataSet.js';
import { ROWS } from '../../corpus/rows/index.js';
import { checkCase } from './checkCase.js';

describe.each(ROWS.filter(({ section }) => section === 'B'))('$row: $title', ({ cases }) => {
  it.each(cases)('$verdict: $name', async (one) => {
    const { index } = await checkCase(one);
    const names = index.leftOut.map(({ file }) => file);
    for (const { slices } of index.stacks) {
      for (const { file } of slices) expect(names).not.toContain(file);
    }
  });
});

describe('Section B', () => {
  it('has every row from 19 to 37', () => {
    const rows = ROWS.filter(({ section }) => section === 'B').map(({ row }) => row);
    expect(rows).toEqual(Array.from({ length: 19 }, (_, index) => index + 19));
  });

  it('23: stops inflating at its limit', () => {
    const bomb = new Uint8Array(deflateRawSync(new Uint8Array(8 << 20)));
    expect(bomb.length).toBeLessThan(20_000);
    expect(inflateRaw(bomb, 1 << 20)).toMatchObject({
      ok: false,
      refusal: { code: 'inflates-too-far' },
    });
    expect(inflateRaw(bomb, 8 << 20)).toMatchObject({ ok: true });
  });

  it('33: makes nothing of the size that a length only states', () => {
    for (const one of ROWS.find(({ row }) => row === 33)?.cases ?? []) {
      for (const bytes of Object.values(one.build())) {
        const before = process.memoryUsage().arrayBuffers;
        openDataSet(bytes);
        expect(process.memoryUsage().arrayBuffers - before).toBeLessThan(1 << 20);
      }
    }
  });

  it('36: the rows of an icon are there, and are not those of the image', async () => {
    const [explicit] = ROWS.find(({ row }) => row === 36)?.cases ?? [];
    const opened = openDataSet(explicit?.build().slice ?? new Uint8Array(0));
    if (!opened.ok) throw new Error(opened.refusal.text);
    const rowsOf = (dataSet: typeof opened.value | undefined) => {
      const place = dataSet?.find('x00280010');
      return place && dataSet?.bytes[place.offset];
    };
    expect(rowsOf(opened.value.items('x00880200')?.[0])).toBe(64);
    expect(rowsOf(opened.value)).toBe(4);
  });
});
