import type { Digest } from '../../note/life/index.js';
import { hmacSha256 } from './hmacSha256.js';

/** What stands for a UID or an identifier of the note in everything that is exported with one salt. */
export interface Pseudonyms {
  readonly uidOf: (uid: string) => string;
  /** Every UID inside a sentence replaced. */
  readonly withUids: (text: string) => string;
  /** The way back. */
  readonly originalUid: (uid: string) => string | undefined;
}

/** A UID in a sentence: four components or more, so that no version and no number is taken for one. */
const UID_IN_TEXT = /(?<![\d.])[0-2](?:\.\d+){3,}(?![\d]|\.\d)/g;

/**
 * New UIDs for old ones: a UUID of version 8 (RFC 9562 5.8) under 2.25 (PS3.5 B.2) out of the keyed hash of the old
 * one, so that the same UID with the same salt is the same again (action U of PS3.15 E.1), and nobody without the salt
 * can tell which it was.
 *
 * @param texts all UIDs, and all sentences that may hold some; no other can be asked for afterwards
 */
export async function makePseudonyms(
  uids: readonly string[],
  texts: readonly string[],
  salt: string,
  digest: Digest,
): Promise<Pseudonyms> {
  const all = new Set([...uids, ...texts.flatMap((text) => text.match(UID_IN_TEXT) ?? [])]);
  const map = new Map<string, string>();
  for (const uid of all) map.set(uid, uidFromHash(await hmacSha256(salt, `uid ${uid}`, digest)));
  const uidOf = (uid: string): string => {
    const made = map.get(uid);
    if (made === undefined) throw new RangeError('a UID was not collected before it was asked for');
    return made;
  };
  const back = new Map([...map].map(([uid, made]) => [made, uid]));
  return {
    uidOf,
    withUids: (text) => text.replace(UID_IN_TEXT, uidOf),
    originalUid: (uid) => back.get(uid),
  };
}

/** An identifier for a note in place of its own. */
export async function noteIdOf(id: string, salt: string, digest: Digest): Promise<string> {
  return (await hmacSha256(salt, `note ${id}`, digest)).slice(0, 32);
}

function uidFromHash(hex: string): string {
  const version = 0xfn << 76n;
  const variant = 0x3n << 62n;
  const free = BigInt(`0x${hex.slice(0, 32)}`) & ~version & ~variant;
  return `2.25.${free | (0x8n << 76n) | (0x2n << 62n)}`;
}
