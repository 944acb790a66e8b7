import type { Note } from '../../note/schema.js';
import { stableUid } from '../../stableUid.js';

const UID = /^[0-2](\.(0|[1-9]\d*))+$/;

/** The study that a document belongs to; one of the note's own where the files name none. */
export function studyUidOf({ id, study }: Pick<Note, 'id' | 'study'>): string {
  return study.studyInstanceUid === '' ? stableUid(`${id}\nstudy`) : uidOf(study.studyInstanceUid);
}

/** A UID as it stands, or one made from the text where it is none (PS3.5 9.1): a document without it could not be filed. */
export function uidOf(text: string): string {
  return UID.test(text) && text.length <= 64 ? text : stableUid(text);
}
