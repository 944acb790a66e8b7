import { utf8 } from './dicom/write/utf8.js';

const OFFSET = 0x6c62272e07bb014262b821756295c58dn;
const PRIME = 0x0000000001000000000000000000013bn;
const MASK = (1n << 128n) - 1n;

/**
 * The 128-bit FNV-1a hash of a text (RFC 9923; Fowler, Noll, Vo). Not for secrets: it only tells texts apart.
 */
export function hash128(text: string): bigint {
  return utf8(text).reduce((hash, byte) => ((hash ^ BigInt(byte)) * PRIME) & MASK, OFFSET);
}

/**
 * A UID that is the same for the same text: a name-based UUID of version 8 (RFC 9562 5.8) under 2.25 (PS3.5 B.2).
 */
export function stableUid(text: string): string {
  const version = 0xfn << 76n;
  const variant = 0x3n << 62n;
  const free = hash128(text) & MASK & ~version & ~variant;
  return `2.25.${free | (0x8n << 76n) | (0x2n << 62n)}`;
}
