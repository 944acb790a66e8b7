import { describe, expect, it } from 'vitest';
import { formatPersonName, visibleText } from '../../../core/format/index.js';
import { escapeHtml } from '../../../core/report/escapeHtml.js';
import { spreadsheetCell } from '../../../core/report/spreadsheetCell.js';
import { ROWS } from '../../corpus/rows/index.js';
import { HARMFUL_NAME } from '../../corpus/rows/text.js';
import { checkCase } from './checkCase.js';

describe.each(ROWS.filter(({ section }) => section === 'C'))('$row: $title', ({ cases }) => {
  it.each(cases)('$verdict: $name', async (one) => {
    const { index } = await checkCase(one);
    const names = index.leftOut.map(({ file }) => file);
    for (const { slices } of index.stacks) {
      for (const { file } of slices) expect(names).not.toContain(file);
    }
  });
});

describe('Section C', () => {
  it('has every row from 38 to 50', () => {
    const rows = ROWS.filter(({ section }) => section === 'C').map(({ row }) => row);
    expect(rows).toEqual(Array.from({ length: 13 }, (_, index) => index + 38));
  });

  it('44: shows what would be hidden', () => {
    expect(formatPersonName(HARMFUL_NAME)).toBe('<script>alert(1)</script>, ‹202E›evil‹202C›');
    expect(visibleText('A\0B\x07^C\x7f')).toBe('A‹0000›B‹0007›^C‹007F›');
  });

  it('44: is text in HTML and no formula in a table', () => {
    expect(escapeHtml(HARMFUL_NAME)).toBe('&lt;script&gt;alert(1)&lt;/script&gt;^‹202E›evil‹202C›');
    for (const start of ['=', '+', '-', '@', '\t']) {
      expect(spreadsheetCell(`${start}cmd()`).startsWith("'")).toBe(true);
    }
  });

  it.each([
    ['a soft hyphen', '\u00ad', '‹00AD›'],
    ['a combining grapheme joiner', '\u034f', '‹034F›'],
    ['a Mongolian vowel separator', '\u180e', '‹180E›'],
    ['an interlinear anchor', '\ufff9', '‹FFF9›'],
    ['a tag character', '\u{e0041}', '‹E0041›'],
    ['a lone surrogate', '\ud800', '‹D800›'],
  ])('44: names %s', (_, hidden, shown) => {
    expect(visibleText(`a${hidden}b`)).toBe(`a${shown}b`);
  });

  it('44: leaves letters of all scripts as they are', () => {
    const names = '山田^太郎 홍^길동 قباني שרון Çavuşoğlu नमस्ते 𠮷野 👩';
    expect(visibleText(names)).toBe(names);
  });
});
