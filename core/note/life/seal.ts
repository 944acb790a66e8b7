import { utf8 } from '../../dicom/write/utf8.js';
import type { Note } from '../schema.js';
import { canonicalJson } from './canonicalJson.js';

/** SHA-256 of bytes as 64 hexadecimal digits. The caller brings it: pages and Node each have their own. */
export type Digest = (bytes: Uint8Array) => Promise<string>;

/** Whether a note still is what was verified. */
export type SealState = 'not sealed' | 'intact' | 'changed';

/**
 * SHA-256 over the canonical JSON of a note, its seal's own hash left out: name and time of the verification are
 * covered, and so are fields that this version does not know.
 */
export function sealDigest(note: object, digest: Digest): Promise<string> {
  const seal: unknown = 'seal' in note ? note.seal : undefined;
  const open = isObject(seal) ? { ...note, seal: { ...seal, sha256: undefined } } : note;
  return digest(utf8(canonicalJson(open)));
}

/**
 * Checks a note as it was read from its file, before any schema has touched it: each changed value is seen, whoever
 * changed it. A note that says it is verified and has no seal counts as changed.
 */
export async function checkSeal(json: unknown, digest: Digest): Promise<SealState> {
  if (!isObject(json)) return 'not sealed';
  const { seal, verification } = json;
  if (!isObject(seal)) return verification === 'VERIFIED' ? 'changed' : 'not sealed';
  if (verification !== 'VERIFIED') return 'changed';
  return (await sealDigest(json, digest)) === seal.sha256 ? 'intact' : 'changed';
}

/** Whether a note can't be changed without an amendment. */
export function isSealed(note: Pick<Note, 'verification'>): boolean {
  return note.verification === 'VERIFIED';
}

function isObject(value: unknown): value is Record<string, unknown> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}
