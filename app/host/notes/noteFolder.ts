import { createHash } from 'node:crypto';

/** Whose note of which study. */
export interface NoteKey {
  readonly studyInstanceUid: string;
  readonly reader: string;
}

/** Name of the folder that holds a note and its earlier versions: a hash, so that a listing tells nobody's identity. */
export function noteFolderName({ studyInstanceUid, reader }: NoteKey): string {
  const key = JSON.stringify([studyInstanceUid, reader.trim().normalize('NFC')]);
  return createHash('sha256').update(key).digest('hex').slice(0, 40);
}

/** Strong entity tag of a stored note (RFC 9110 section 8.8.3): SHA-256 of its bytes, in quotes. */
export function entityTag(bytes: Uint8Array): string {
  return `"${createHash('sha256').update(bytes).digest('hex')}"`;
}
