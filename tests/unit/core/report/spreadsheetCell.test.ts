import { describe, expect, it } from 'vitest';
import { spreadsheetCell } from '../../../../core/report/index.js';

describe('spreadsheetCell', () => {
  it.each([
    ['=1+1', "'=1+1"],
    ['+cmd', "'+cmd"],
    ['-2+3', "'-2+3"],
    ['@SUM(A1)', "'@SUM(A1)"],
    [' =1', "' =1"],
    ['＝1+1', "'＝1+1"],
    ['\t=1', "'‹0009›=1"],
    ['\r=1', "' / =1"],
    ['a;=1', "a;'=1"],
    ['-90', '-90'],
    ['+1.5e3', '+1.5e3'],
    ['1-2', '1-2'],
    ['a\nb', 'a / b'],
    ['a\u202eb\u0000', 'a‹202E›b‹0000›'],
    ['−90', '−90'],
    ['', ''],
  ])('makes the text %j the cell %j', (text, cell) => {
    expect(spreadsheetCell(text)).toBe(cell);
  });

  it.each([
    [-90, '-90'],
    [-0, '0'],
    [0.1 + 0.2, '0.30000000000000004'],
    [Number.NaN, ''],
    [Number.POSITIVE_INFINITY, ''],
    [null, ''],
  ])('writes %s as %j', (value, cell) => {
    expect(spreadsheetCell(value)).toBe(cell);
  });
});
