import { describe, expect, it } from 'vitest';
import type { CtImage, VoiWindow } from '../../../../core/dicom/index.js';
import {
  defaultWindow,
  isSameWindow,
  nextFileWindow,
  windowed,
  windowWords,
} from '../../../../core/intensity/index.js';
import { greyTable } from '../../../../renderer/plates/greyTables.js';
import { draggedWindow } from '../../../../renderer/tools/windowTool.js';
import { sampleStack } from '../../renderer/sample.js';

const TABLE: VoiWindow = {
  centre: 12,
  width: 4,
  function: 'LINEAR',
  explanation: 'BONE',
  table: [
    [10, 0],
    [11, 100],
    [13, 255],
  ],
};
const SOFT: VoiWindow = { centre: 40, width: 400, function: 'LINEAR' };
const LUNG: VoiWindow = { centre: -600, width: 1500, function: 'LINEAR' };

const image = (windows: readonly VoiWindow[]): CtImage => ({
  ...sampleStack().slices[0].image,
  windows,
});

describe('A window with a table (PS3.3 C.11.2.1.1)', () => {
  it('has the level of the step at or before; the first below all, the last above all', () => {
    const levels = [-2000, 9, 10, 10.4, 11, 12, 12.6, 13, 14, 3000].map((x) => windowed(x, TABLE));
    expect(levels).toEqual([0, 0, 0, 0, 100, 100, 255, 255, 255, 255]);
  });

  it('is called by its name, and not by a centre and a width that it does not have', () => {
    expect(windowWords(TABLE)).toBe('LUT “BONE”');
    expect(windowWords(LUNG)).toBe('C −600 W 1500');
  });

  it('is a plain window again once it is dragged', () => {
    expect(draggedWindow(TABLE, 0, 0)).toEqual({ centre: 12, width: 4, function: 'LINEAR' });
  });

  it('has greys of its own, beside those of the same centre and width', () => {
    const { pixels } = sampleStack().slices[0].image;
    const plain = { centre: 12, width: 4, function: 'LINEAR' } as const;
    expect(greyTable(pixels, TABLE)[11]).toBe(0xff646464);
    expect(greyTable(pixels, plain)[11]).not.toBe(0xff646464);
    const other: VoiWindow = { ...TABLE, table: [[10, 7]] };
    expect(greyTable(pixels, other)[11]).toBe(0xff070707);
    expect(greyTable(pixels, TABLE)).toBe(greyTable(pixels, { ...TABLE }));
  });
});

describe('The windows of a file', () => {
  it('follow each other, round and round, tables among them', () => {
    const three = image([SOFT, TABLE, LUNG]);
    expect(nextFileWindow(three, SOFT)).toBe(TABLE);
    expect(nextFileWindow(three, { ...TABLE })).toBe(LUNG);
    expect(nextFileWindow(three, LUNG)).toBe(SOFT);
  });

  it('begin with the first from any other window; without any the usual one is taken', () => {
    expect(nextFileWindow(image([SOFT, LUNG]), { ...SOFT, width: 401 })).toBe(SOFT);
    expect(nextFileWindow(image([]), SOFT)).toEqual(defaultWindow(image([])));
  });

  it('are the same only where they show the same', () => {
    expect(isSameWindow(TABLE, { ...TABLE, explanation: 'another name' })).toBe(true);
    expect(isSameWindow(TABLE, { centre: 12, width: 4, function: 'LINEAR' })).toBe(false);
    expect(isSameWindow(TABLE, { ...TABLE, table: [[10, 0]] })).toBe(false);
    expect(isSameWindow(SOFT, { ...SOFT, function: 'SIGMOID' })).toBe(false);
  });
});
