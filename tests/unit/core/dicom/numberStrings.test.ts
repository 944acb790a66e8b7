import { describe, expect, it } from 'vitest';
import { decimalString, integerString } from '../../../../core/dicom/numberStrings.js';

describe('decimalString', () => {
  it.each([
    ['0.5', 0.5],
    [' -1.25e2 ', -125],
    ['.5', 0.5],
    ['5.', 5],
    ['0,143', 0.143],
    ['-158.135803000000001', -158.135803],
  ])('reads %j', (text, value) => expect(decimalString(text)).toBe(value));

  it.each(['', 'NaN', 'Inf', '-Infinity', '1.2,3', '1,2,3', 'ten', '1e999'])(
    'gives no value for %j',
    (text) => expect(decimalString(text)).toBeUndefined(),
  );
});

describe('integerString', () => {
  it('takes 1.0 as 1 and gives no value for 4.1', () => {
    expect([integerString('1.0'), integerString('4.1')]).toEqual([1, undefined]);
  });
});
