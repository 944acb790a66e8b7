import type { Note } from './schema.js';
import { touched } from './touched.js';
import { type VisibilityChoice, visibilityOf } from './visibilityOf.js';

/** Keeps in the note what the reader asked about visibility; null takes it out. What it comes to is computed. */
export function setVisibility(note: Note, choice: VisibilityChoice | null, now: string): Note {
  const visibility = choice === null ? null : visibilityOf(note, undefined, choice);
  return touched(note, { visibility }, now);
}
