import { utf8 } from './dicom/write/utf8.js';

/** Offset basis of the 128-bit FNV hash in pieces of 16 bits, lowest first. */
const OFFSET = [0xc58d, 0x6295, 0x2175, 0x62b8, 0x0142, 0x07bb, 0x272e, 0x6c62] as const;
/** The prime is 2⁸⁸ + 315. */
const PRIME_LOW = 0x13b;
const MASK = (1n << 128n) - 1n;

/**
 * The 128-bit FNV-1a hash of a text (RFC 9923; Fowler, Noll, Vo). Not for secrets: it only tells texts apart.
 */
export function hash128(text: string): bigint {
  return hashBytes128(utf8(text));
}

/** The 128-bit FNV-1a hash of bytes, in pieces of 16 bits: big integers are too slow for a whole file. */
export function hashBytes128(bytes: Uint8Array): bigint {
  const hash = Uint32Array.from(OFFSET);
  const product = new Uint32Array(8);
  for (const byte of bytes) {
    hash[0] = at(hash, 0) ^ byte;
    let carry = 0;
    for (let piece = 0; piece < 8; piece += 1) {
      // A shift by 88 bits is one by five pieces and a half.
      const shifted =
        piece < 5
          ? 0
          : ((at(hash, piece - 5) << 8) & 0xffff) | (piece === 5 ? 0 : at(hash, piece - 6) >>> 8);
      const sum = at(hash, piece) * PRIME_LOW + shifted + carry;
      product[piece] = sum & 0xffff;
      carry = sum >>> 16;
    }
    hash.set(product);
  }
  return [...hash].reduceRight((whole, piece) => (whole << 16n) | BigInt(piece), 0n);
}

function at(pieces: Uint32Array, index: number): number {
  return pieces[index] as number;
}

/**
 * A UID that is the same for the same text: a name-based UUID of version 8 (RFC 9562 5.8) under 2.25 (PS3.5 B.2).
 */
export function stableUid(text: string): string {
  return uidOfHash(hash128(text));
}

/** The same for bytes, such as those of a whole file. */
export function stableUidOfBytes(bytes: Uint8Array): string {
  return uidOfHash(hashBytes128(bytes));
}

function uidOfHash(hash: bigint): string {
  const version = 0xfn << 76n;
  const variant = 0x3n << 62n;
  const free = hash & MASK & ~version & ~variant;
  return `2.25.${free | (0x8n << 76n) | (0x2n << 62n)}`;
}
