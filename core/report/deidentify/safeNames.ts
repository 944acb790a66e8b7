import type { Note } from '../../note/schema.js';

/** Names as the program gives them, by the identifiers of a note. */
export interface SafeNames {
  /** The identifier itself where it is one of the program's ('L2'); else one made from its place. */
  readonly idOf: (id: string) => string;
}

/** What the program gives: a letter and a number. A note from elsewhere may have a name here. */
const OWN_ID = /^[A-Z]\d{1,6}$/;

/** Identifiers of all that a note lists, so that they can't be anybody's name. */
export function safeNames(note: Note): SafeNames {
  const { regions, contrasts, findings, edges, repeats, profiles, stents, planes } = note;
  const ids = [
    ...[...regions, ...contrasts, ...findings, ...edges, ...repeats],
    ...[...profiles, ...stents, ...planes],
  ].map(({ id }) => id);
  const foreign = [...new Set(ids.filter((id) => !OWN_ID.test(id)))];
  return {
    idOf: (id) => {
      if (OWN_ID.test(id)) return id;
      const place = foreign.indexOf(id);
      return place < 0 ? 'unknown' : `item-${place + 1}`;
    },
  };
}
