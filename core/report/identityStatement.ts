import type { Note } from '../note/schema.js';

/** Whether an export says who the patient is: every export has this sentence. */
export function identityStatement({ deidentified }: Pick<Note, 'deidentified'>): string {
  return deidentified === undefined
    ? 'With identity, for the patient’s record.'
    : `De-identified, for research. ${deidentified.join(' ')}`;
}
