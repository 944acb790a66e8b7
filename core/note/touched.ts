import { withProposedQuotes } from './quoteInForce.js';
import type { Note } from './schema.js';
import { renewedVisibility } from './visibilityOf.js';

/**
 * The note with changes, and the time of the change. A verified note speaks for its content at that time
 * only, so an edit makes it unverified again.
 */
export function touched(note: Note, changes: Partial<Note>, now: string): Note {
  const next: Note = { ...note, ...changes, verification: 'UNVERIFIED', changedAt: now };
  return { ...next, visibility: renewedVisibility(next), ...withProposedQuotes(next) };
}
