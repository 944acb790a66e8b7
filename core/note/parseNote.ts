import { type Result, refuse, success } from '../result.js';
import { fieldProblems } from './fieldProblem.js';
import { type Note, NoteSchema } from './schema.js';

/** Checks a reading note as read from JSON. A newer version has a code of its own: the note is not broken then. */
export function parseNote(json: unknown): Result<Note> {
  if (typeof json !== 'object' || json === null || !('format' in json)) {
    return refuse('not-a-note', 'This is not a reading note: it has no "format": "diptych-note".');
  }
  if (json.format !== 'diptych-note') {
    return refuse('not-a-note', 'This is not a reading note: its format is not "diptych-note".');
  }
  if ('version' in json && typeof json.version === 'number' && json.version > 1) {
    return refuse(
      'newer-note',
      `The note is of version ${json.version}; this version of Diptych reads version 1. Use a newer Diptych.`,
    );
  }
  const parsed = NoteSchema.safeParse(json, { reportInput: true });
  return parsed.success
    ? success(parsed.data)
    : refuse('broken-note', `The note can’t be read: ${fieldProblems(parsed.error)}`);
}
