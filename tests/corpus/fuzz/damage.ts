import fc from 'fast-check';

/** One wound of a file. Places are fractions of its length, so that one wound fits files of any size. */
export type Damage =
  | { readonly kind: 'flip'; readonly at: number; readonly bit: number }
  | { readonly kind: 'byte'; readonly at: number; readonly value: number }
  | { readonly kind: 'length'; readonly at: number; readonly value: number }
  | { readonly kind: 'cut'; readonly at: number }
  | { readonly kind: 'remove'; readonly at: number; readonly count: number }
  | { readonly kind: 'insert'; readonly at: number; readonly bytes: Uint8Array }
  | { readonly kind: 'splice'; readonly at: number; readonly from: number; readonly count: number };

/** Most wounds are where headers are: at the beginning. */
const place = fc.oneof(
  { weight: 3, arbitrary: fc.double({ min: 0, max: 1, noNaN: true }).map((x) => x ** 3) },
  { weight: 1, arbitrary: fc.double({ min: 0, max: 1, noNaN: true }) },
);
const count = fc.integer({ min: 1, max: 64 });
const dangerous = fc.constantFrom(0xffffffff, 0xfffffffe, 0x7fffffff, 0x80000000, 0x10000, 0, 1);

/** Flips, overwritten bytes and lengths, cuts, holes, insertions and copies of one part over another. */
export const damage: fc.Arbitrary<Damage> = fc.oneof(
  fc.record({ kind: fc.constant('flip' as const), at: place, bit: fc.integer({ min: 0, max: 7 }) }),
  fc.record({
    kind: fc.constant('byte' as const),
    at: place,
    value: fc.integer({ min: 0, max: 255 }),
  }),
  fc.record({ kind: fc.constant('length' as const), at: place, value: dangerous }),
  fc.record({ kind: fc.constant('cut' as const), at: fc.double({ min: 0, max: 1, noNaN: true }) }),
  fc.record({ kind: fc.constant('remove' as const), at: place, count }),
  fc.record({
    kind: fc.constant('insert' as const),
    at: place,
    bytes: fc.uint8Array({ minLength: 1, maxLength: 32 }),
  }),
  fc.record({ kind: fc.constant('splice' as const), at: place, from: place, count }),
);

/** A file with wounds, in their order. The file that was given stays as it was. */
export function wounded(file: Uint8Array, wounds: readonly Damage[]): Uint8Array {
  return wounds.reduce<Uint8Array>(wound, file);
}

function wound(file: Uint8Array, one: Damage): Uint8Array {
  if (file.length === 0) return file;
  const at = Math.min(file.length - 1, Math.floor(one.at * file.length));
  if (one.kind === 'cut') return file.slice(0, at);
  if (one.kind === 'remove') return join(file.subarray(0, at), file.subarray(at + one.count));
  if (one.kind === 'insert') return join(file.subarray(0, at), one.bytes, file.subarray(at));
  const copy = file.slice();
  if (one.kind === 'flip') copy[at] = (copy[at] ?? 0) ^ (1 << one.bit);
  else if (one.kind === 'byte') copy[at] = one.value;
  else if (one.kind === 'length') {
    const view = new DataView(copy.buffer);
    if (at + 4 <= copy.length) view.setUint32(at, one.value, true);
  } else {
    const from = Math.min(file.length - 1, Math.floor(one.from * file.length));
    copy.set(file.subarray(from, from + Math.min(one.count, file.length - at)), at);
  }
  return copy;
}

function join(...parts: readonly Uint8Array[]): Uint8Array {
  const whole = new Uint8Array(parts.reduce((sum, part) => sum + part.length, 0));
  let at = 0;
  for (const part of parts) {
    whole.set(part, at);
    at += part.length;
  }
  return whole;
}
