import { ROLE_LETTER, type Role } from '../region/roles.js';
import type { Note } from './schema.js';

/** Letters that begin the identifiers of what is no region. */
export const CONTRAST_LETTER = 'C';
export const FINDING_LETTER = 'D';

/** Name of a role as the reader sees it at the head of a label: 'Lumen'. */
export const ROLE_NAME: Readonly<Record<Role, string>> = {
  lumen: 'Lumen',
  wall: 'Wall',
  plaque: 'Plaque',
  fat: 'Fat',
  reference: 'Reference',
};

/** A number that the note has never used for this letter, and the counters that remember it. */
export interface NextNumber {
  readonly id: string;
  readonly number: number;
  readonly lastNumbers: Readonly<Record<string, number>>;
}

/**
 * The next identifier of a letter: one above the highest that the note holds or has ever held, so that
 * 'L2' in an old export never means another region.
 */
export function nextNumber(note: Note, letter: string): NextNumber {
  const remembered = rememberedNumbers(note);
  const number = (remembered[letter] ?? 0) + 1;
  return { id: `${letter}${number}`, number, lastNumbers: { ...remembered, [letter]: number } };
}

/** Identifier and label of the next region of a role: 'L2' and 'Lumen 2'. */
export function nextRegionName(note: Note, role: Role): NextNumber & { readonly label: string } {
  const next = nextNumber(note, ROLE_LETTER[role]);
  return { ...next, label: `${ROLE_NAME[role]} ${next.number}` };
}

/** Highest number by letter, over what the note holds and what it remembers. Kept before anything is removed. */
export function rememberedNumbers(note: Note): Readonly<Record<string, number>> {
  const highest: Record<string, number> = { ...note.lastNumbers };
  const { regions, contrasts, findings, edges, profiles, stents, planes, repeats } = note;
  for (const { id } of [
    ...regions,
    ...contrasts,
    ...findings,
    ...edges,
    ...profiles,
    ...stents,
    ...planes,
    ...repeats,
  ]) {
    const [, letter, digits] = /^([A-Z])(\d{1,9})$/.exec(id) ?? [];
    if (letter === undefined) continue;
    highest[letter] = Math.max(highest[letter] ?? 0, Number(digits));
  }
  return highest;
}
