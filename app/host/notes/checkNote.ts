import { type Note, parseNote } from '../../../core/note/index.js';
import { type Result, refuse } from '../../../core/result.js';
import { parseJson } from '../storage/jsonFile.js';

/** A note that was sent to be stored; 'note-invalid' with its faults when it does not fit the schema. */
export function checkSentNote(value: unknown): Result<Note> {
  const parsed = parseNote(value);
  return parsed.ok ? parsed : refuse('note-invalid', parsed.refusal.text);
}

/** A note that was stored before. One that can't be understood is told from one of a newer program. */
export function checkStoredNote(bytes: Uint8Array): Result<Note> {
  const parsed = parseNote(decode(bytes));
  if (parsed.ok) return parsed;
  return parsed.refusal.code === 'newer-note'
    ? refuse('note-newer', `${parsed.refusal.text} The stored note was left as it is.`)
    : refuse(
        'note-broken',
        `The stored note of this study was left as it is; earlier versions lie beside it in the notes folder. ${parsed.refusal.text}`,
      );
}

/** The JSON value of UTF-8 bytes; undefined when they are neither. */
function decode(bytes: Uint8Array): unknown {
  try {
    return parseJson(new TextDecoder('utf-8', { fatal: true }).decode(bytes));
  } catch (error) {
    if (error instanceof TypeError) return undefined;
    throw error;
  }
}
