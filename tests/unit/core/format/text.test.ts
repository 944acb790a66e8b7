import { describe, expect, it } from 'vitest';
import {
  formatDicomDate,
  formatPersonName,
  formatPosition,
  visibleText,
} from '../../../../core/format/index.js';

describe('formatPosition', () => {
  it('names the sides of LPS axes: x to the left, y to the back, z to the head (PS3.3 C.7.6.2.1.1)', () => {
    expect(formatPosition([35.3, -20.7, 10])).toBe('L 35.3 · A 20.7 · H 10.0 mm');
    expect(formatPosition([-1, 2, -3.25], 2)).toBe('R 1.00 · P 2.00 · F 3.25 mm');
  });
  it('gives a coordinate that rounds to zero the positive side', () => {
    expect(formatPosition([-0.01, 0, -0.04])).toBe('L 0.0 · P 0.0 · H 0.0 mm');
  });
});

describe('formatPersonName', () => {
  // Examples of PS3.5 6.2.1.1, from memory: component order family, given, middle, prefix, suffix.
  it('puts the components of the standard’s first example in their order', () => {
    expect(formatPersonName('Adams^John Robert Quincy^^Rev.^B.A. M.Div.')).toBe(
      'Adams, John Robert Quincy, Rev., B.A. M.Div.',
    );
  });
  it('takes the first component group that has text', () => {
    expect(formatPersonName('Yamada^Tarou=山田^太郎=やまだ^たろう')).toBe('Yamada, Tarou');
    expect(formatPersonName('=山田^太郎')).toBe('山田, 太郎');
  });
  it('is empty when there is no name', () => {
    expect(formatPersonName('')).toBe('');
    expect(formatPersonName('^^^^')).toBe('');
  });
});

describe('formatDicomDate', () => {
  it('writes a DA value as ISO 8601 does, the retired form with dots too', () => {
    expect(formatDicomDate('19580302')).toBe('1958-03-02');
    expect(formatDicomDate('1958.03.02')).toBe('1958-03-02');
  });
  it('leaves what is no date as it stands', () => {
    expect(formatDicomDate('unknown')).toBe('unknown');
  });
});

describe('visibleText', () => {
  it('names control characters and those of UAX #9 that turn the direction of text', () => {
    expect(visibleText('a\u202eb\u0000c\u2066d')).toBe('a‹202E›b‹0000›c‹2066›d');
  });
  it('leaves letters of all scripts, combining marks and markup characters alone', () => {
    expect(visibleText('Müller 山田 e\u0301 <b>')).toBe('Müller 山田 e\u0301 <b>');
  });
});
