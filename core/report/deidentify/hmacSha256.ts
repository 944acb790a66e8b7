import { utf8 } from '../../dicom/write/utf8.js';
import type { Digest } from '../../note/life/index.js';

/** Bytes of a block of SHA-256. */
const BLOCK = 64;

/**
 * The keyed hash HMAC-SHA-256 (RFC 2104, FIPS 198-1) of a text as 64 hexadecimal digits. Without the key nobody can
 * tell which text a hash is of, not even by trying texts.
 */
export async function hmacSha256(key: string, text: string, digest: Digest): Promise<string> {
  const raw = utf8(key);
  const short = raw.length > BLOCK ? bytesOf(await digest(raw)) : raw;
  const block = new Uint8Array(BLOCK);
  block.set(short);
  const inner = await digest(
    joined(
      block.map((byte) => byte ^ 0x36),
      utf8(text),
    ),
  );
  return digest(
    joined(
      block.map((byte) => byte ^ 0x5c),
      bytesOf(inner),
    ),
  );
}

function bytesOf(hex: string): Uint8Array {
  return Uint8Array.from(hex.match(/../g) ?? [], (pair) => Number.parseInt(pair, 16));
}

function joined(a: Uint8Array, b: Uint8Array): Uint8Array {
  const all = new Uint8Array(a.length + b.length);
  all.set(a);
  all.set(b, a.length);
  return all;
}
