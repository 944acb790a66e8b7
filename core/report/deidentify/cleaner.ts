import { FLAGS, type Flag } from '../../region/index.js';
import type { SafeNames } from './safeNames.js';

/** What cleans the parts of a note. */
export interface Cleaner {
  readonly uid: (uid: string) => string;
  /** A sentence of the program with new UIDs; another one in its place where it told who or when. */
  readonly sentence: (text: string) => string;
  /** A label from a file, null where it told who or when. */
  readonly label: (text: string | null) => string | null;
  readonly ids: SafeNames;
}

/** The image that a value lies on, if any, under its new UID. */
export function cleanUid(uid: string | null, cleaner: Pick<Cleaner, 'uid'>): string | null {
  return uid === null ? null : cleaner.uid(uid);
}

/** A flag that refuses a pair says of which patient each stack is: what it means is kept, the names are not. */
export function cleanFlag({ code, text }: Flag, { sentence }: Pick<Cleaner, 'sentence'>): Flag {
  return code === FLAGS.notOneAcquisition('').code
    ? { code, text: 'Not measured here: not one acquisition.' }
    : { code, text: sentence(text) };
}

/** The oblique plane that something is measured on, under a safe name; nothing where there is none. */
export function cleanPlaneReference(
  { plane }: { readonly plane?: string },
  { ids }: Pick<Cleaner, 'ids'>,
): { readonly plane?: string } {
  return plane === undefined ? {} : { plane: ids.idOf(plane) };
}

/** A name that the program gives: 'Profile 2' for 'X2'; the word alone for a foreign identifier without a number. */
export function safeLabel(word: string, safeId: string): string {
  return `${word} ${/\d+$/.exec(safeId)?.[0] ?? ''}`.trim();
}
