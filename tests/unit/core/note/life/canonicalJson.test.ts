import { describe, expect, it } from 'vitest';
import { canonicalJson } from '../../../../../core/note/life/index.js';

// The examples of RFC 8785, sections 3.2.2 to 3.2.4 and appendix B, from memory; numbers re-checked with ECMAScript.
describe('The canonical form of a JSON value', () => {
  it('is that of the example of section 3.2.3: keys in order, numbers and strings as ECMAScript has them', () => {
    const value: unknown = JSON.parse(
      String.raw`{"numbers": [333333333.33333329, 1E30, 4.50, 2e-3, 0.000000000000000000000000001], "string": "\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"\/", "literals": [null, true, false]}`,
    );
    expect(canonicalJson(value)).toBe(
      String.raw`{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\u000f\nA'B\"\\\\\"/"}`,
    );
  });

  it('sorts keys by UTF-16 code units, as the example of section 3.2.3 has them', () => {
    const value = {
      '\u20ac': 'Euro Sign',
      '\r': 'Carriage Return',
      '\ufb33': 'Hebrew Letter Dalet With Dagesh',
      '1': 'One',
      '\ud83d\ude00': 'Emoji: Grinning Face',
      '\u0080': 'Control',
      '\u00f6': 'Latin Small Letter O With Diaeresis',
    };
    const keys = Object.keys(JSON.parse(canonicalJson(value)) as object);
    expect([...canonicalJson(value).matchAll(/:"(\w+)/g)].map(([, word]) => word)).toEqual([
      'Carriage',
      'One',
      'Control',
      'Latin',
      'Euro',
      'Emoji',
      'Hebrew',
    ]);
    expect(keys).toHaveLength(7);
  });

  it.each([
    [0, '0'],
    [-0, '0'],
    [5e-324, '5e-324'],
    [-1.7976931348623157e308, '-1.7976931348623157e+308'],
    [9007199254740992, '9007199254740992'],
    [295147905179352830000, '295147905179352830000'],
    [9.999999999999997e22, '9.999999999999997e+22'],
    [1e23, '1e+23'],
    [0.000001, '0.000001'],
    [333333333.3333332, '333333333.3333332'],
  ])('writes the number %d as %s (appendix B)', (value, text) => {
    expect(canonicalJson(value)).toBe(text);
  });

  it('does not depend on the order of keys or on properties that are undefined', () => {
    expect(canonicalJson({ b: [1, { d: 2, c: 3 }], a: undefined })).toBe('{"b":[1,{"c":3,"d":2}]}');
  });

  it('refuses what JSON has no form for', () => {
    expect(() => canonicalJson([Number.NaN])).toThrow('finite');
    expect(() => canonicalJson({ a: '\ud800' })).toThrow('surrogate');
    expect(() => canonicalJson([() => 1])).toThrow('function');
  });
});
