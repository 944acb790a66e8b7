import { describe, expect, it } from 'vitest';
import { hash128, hashBytes128 } from '../../../core/stableUid.js';

describe('hash128', () => {
  it.each([
    // Test vectors of the FNV authors (www.isthe.com/chongo/tech/comp/fnv), from memory.
    ['', '6c62272e07bb014262b821756295c58d'],
    ['a', 'd228cb696f1a8caf78912b704e4a8964'],
    ['foobar', '343e1662793c64bf6f0d3597ba446f18'],
  ])('gives the published value for “%s”', (text, hex) => {
    expect(hash128(text).toString(16).padStart(32, '0')).toBe(hex);
  });

  it('is the definition of RFC 9923 for any bytes', () => {
    const prime = 0x0000000001000000000000000000013bn;
    const bytes = Uint8Array.from({ length: 500 }, (_, index) => (index * index * 37 + 11) & 0xff);
    let hash = 0x6c62272e07bb014262b821756295c58dn;
    for (const byte of bytes) hash = ((hash ^ BigInt(byte)) * prime) & ((1n << 128n) - 1n);
    expect(hashBytes128(bytes)).toBe(hash);
  });
});
