import { describe, expect, it } from 'vitest';
import {
  formatCount,
  formatFixed,
  formatMeanSd,
  formatQuantity,
  formatSigned,
} from '../../../../core/format/index.js';

describe('formatFixed', () => {
  it('keeps its digits and uses the real minus sign U+2212', () => {
    expect(formatFixed(532.44, 1)).toBe('532.4');
    expect(formatFixed(-88, 1)).toBe('\u221288.0');
  });
  it('has no negative zero', () => {
    expect(formatFixed(-0.04, 1)).toBe('0.0');
    expect(formatFixed(-0, 0)).toBe('0');
  });
  it('rounds as Number.prototype.toFixed (ECMA-262 21.1.3.3), away from zero for both signs', () => {
    expect(formatFixed(2.25, 1)).toBe('2.3');
    expect(formatFixed(-2.25, 1)).toBe('\u22122.3');
  });
  it.each([null, undefined, Number.NaN, Number.POSITIVE_INFINITY])(
    'shows an en dash for %s',
    (value) => {
      expect(formatFixed(value, 1)).toBe('\u2013');
    },
  );
});

describe('formatSigned', () => {
  it('always has a sign, but for what rounds to zero', () => {
    expect(formatSigned(3.14, 1)).toBe('+3.1');
    expect(formatSigned(-207.3, 1)).toBe('\u2212207.3');
    expect(formatSigned(0.04, 1)).toBe('0.0');
    expect(formatSigned(-0.04, 1)).toBe('0.0');
    expect(formatSigned(null, 1)).toBe('\u2013');
  });
});

describe('formatMeanSd', () => {
  it('joins mean and SD with the same digits', () => {
    expect(formatMeanSd(369.84, 6.06)).toBe('369.8 ± 6.1');
  });
  it('shows the mean alone without an SD and a dash without a mean', () => {
    expect(formatMeanSd(12, null)).toBe('12.0');
    expect(formatMeanSd(null, 4)).toBe('\u2013');
  });
});

describe('formatCount and formatQuantity', () => {
  it('parts thousands by a thin space (ISO 80000-1, 7.3.1, from memory)', () => {
    expect(formatCount(999)).toBe('999');
    expect(formatCount(1322)).toBe('1\u2009322');
    expect(formatCount(1234567)).toBe('1\u2009234\u2009567');
  });
  it('gives each kind of number its own digits', () => {
    expect(formatQuantity(-1023.6, 'pixelHu')).toBe('\u22121024');
    expect(formatQuantity(0.018, 'lengthMm')).toBe('0.02');
    expect(formatQuantity(8.917, 'ratio')).toBe('8.9');
  });
});
