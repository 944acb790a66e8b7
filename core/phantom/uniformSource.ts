/** Yields numbers that are evenly spread over 0 ≤ u < 1, one at each call. */
export type UniformSource = () => number;

/**
 * The generator xoshiro128** (Blackman & Vigna 2021, doi 10.1145/3460772) from a state of four 32-bit words.
 * Yields whole numbers 0 … 2³² − 1. Throws for the state of zeros, from which it never gets away.
 */
export function xoshiro128(state: readonly [number, number, number, number]): () => number {
  let [a, b, c, d] = state.map((word) => word >>> 0) as [number, number, number, number];
  if ((a | b | c | d) === 0) throw new RangeError('invalid generator state: all zero');
  return () => {
    const result = Math.imul(rotate(Math.imul(b, 5), 7), 9) >>> 0;
    const shifted = b << 9;
    c ^= a;
    d ^= b;
    b ^= c;
    a ^= d;
    c ^= shifted;
    d = rotate(d, 11);
    return result;
  };
}

/**
 * A source that is the same for the same whole numbers and unlike for others: the state is a hash of them
 * (MurmurHash3's mixing of 32-bit words, Appleby 2008), so that each slice has a stream of its own.
 */
export function seededUniform(...numbers: readonly number[]): UniformSource {
  const word = (salt: number): number => numbers.reduce((hash, n) => mix(hash, n), mix(salt, salt));
  const next = xoshiro128([word(1), word(2), word(3), word(4)]);
  return () => next() / 2 ** 32;
}

function rotate(word: number, by: number): number {
  return (word << by) | (word >>> (32 - by));
}

function mix(hash: number, value: number): number {
  let k = Math.imul(value | 0, 0xcc9e2d51);
  k = Math.imul(rotate(k, 15), 0x1b873593);
  let h = Math.imul(rotate(hash ^ k, 13), 5) + 0xe6546b64;
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return (h ^ (h >>> 16)) >>> 0;
}
