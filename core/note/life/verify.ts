import { type Result, refuse, success } from '../../result.js';
import type { Note } from '../schema.js';
import { type Digest, isSealed, sealDigest } from './seal.js';

/** Who verifies, and when (ISO 8601). */
export interface Signature {
  readonly by: string;
  readonly at: string;
}

/**
 * Verifies a note: it is frozen with a name, a time and a hash over its content. Whatever is still missing does not
 * stop the reader; it is listed beside the name. Refused without a name, and for a note that is verified already.
 */
export async function verifyNote(
  note: Note,
  { by, at }: Signature,
  digest: Digest,
): Promise<Result<Note>> {
  if (isSealed(note)) return refuse('already-verified', 'This note is verified already.');
  const name = by.trim();
  if (name === '') {
    return refuse('no-name', 'Verifying needs the name of the reader who answers for the note.');
  }
  const open: Note = {
    ...note,
    verification: 'VERIFIED',
    changedAt: at,
    seal: { by: name, at, sha256: '' },
  };
  const sha256 = await sealDigest(open, digest);
  return success({ ...open, seal: { by: name, at, sha256 } });
}

/** Says whether the reading is finished. Refused for a verified note: what it says of itself is sealed too. */
export function setCompletion(
  note: Note,
  completion: Note['completion'],
  now: string,
): Result<Note> {
  if (isSealed(note)) {
    return refuse('verified', 'This note is verified. Amend it to change it.');
  }
  return success(note.completion === completion ? note : { ...note, completion, changedAt: now });
}
