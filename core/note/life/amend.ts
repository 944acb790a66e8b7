import { type Result, refuse, success } from '../../result.js';
import type { Note } from '../schema.js';
import { isSealed } from './seal.js';

/** Who opens a verified note again, when (ISO 8601) and why. */
export interface AmendmentBeginning {
  readonly by: string;
  readonly at: string;
  readonly why: string;
}

/**
 * Opens a verified note for changes. The note as it was sealed is kept whole inside it, so that nothing that was
 * signed is ever lost, and each amendment says by whom, when and why. Verify it again afterwards.
 *
 * @param sealed the note as it stands in its file, with fields that this version does not know
 */
export function amendNote(
  note: Note,
  sealed: Readonly<Record<string, unknown>>,
  { by, at, why }: AmendmentBeginning,
): Result<Note> {
  if (!isSealed(note)) {
    return refuse('not-verified', 'This note is not verified: it can be changed as it is.');
  }
  if (by.trim() === '') return refuse('no-name', 'An amendment needs the name of who makes it.');
  if (why.trim() === '') return refuse('no-reason', 'An amendment needs a reason.');
  const { amendments: _earlier, ...before } = sealed;
  return success({
    ...note,
    verification: 'UNVERIFIED',
    changedAt: at,
    seal: null,
    amendments: [...note.amendments, { by: by.trim(), at, why: why.trim(), before }],
  });
}
