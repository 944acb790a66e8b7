import { describe, expect, it } from 'vitest';
import { decimalValue } from '../../../../../core/report/sr/decimalValue.js';

const oneDigit = (value: number) => value.toFixed(1);

describe('decimalValue', () => {
  it.each([
    [108, '108'],
    [-0.25, '-0.25'],
    [2.125, '2.125'],
    [0, '0'],
  ])('writes %d, which fits, as it is', (value, text) => {
    expect(decimalValue(value, oneDigit)).toEqual({ text });
  });

  it('fills 16 characters, and gives the number itself beside them', () => {
    // PS3.5 table 6.2-1: a DS has 16 characters at most.
    expect(decimalValue(1816 / 17, oneDigit)).toEqual({
      text: '106.823529411765',
      exact: 1816 / 17,
    });
  });

  it('goes to the side that prints the same where rounding would cross the border of a printed digit', () => {
    // 0.0499999999999999 prints as 0.0; rounded to 16 characters it is 0.05, which prints as 0.1.
    expect(decimalValue(0.049999999999999996, oneDigit).text).toBe('0.04999999999999');
    // 2.6500000000000004 prints as 2.7; 2.65, the nearest in 16 characters, prints as 2.6 (its double lies below).
    expect(decimalValue(-2.6500000000000004, oneDigit).text).toBe('-2.6500000000001');
  });

  it('prints as the value prints, close to every border of a digit', () => {
    for (let tenth = -30; tenth <= 30; tenth += 1) {
      for (const off of [-1e-13, -3e-15, -1e-16, 0, 1e-16, 3e-15, 1e-13]) {
        const value = tenth / 10 + 0.05 + off;
        const { text } = decimalValue(value, oneDigit);
        expect([text.length <= 16, oneDigit(Number(text))]).toEqual([true, oneDigit(value)]);
      }
    }
  });
});
