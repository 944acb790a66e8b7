import { randomBytes } from 'node:crypto';
import { basename } from 'node:path';
import { visibleText } from '../../core/format/index.js';
import type { Note } from '../../core/note/index.js';
import { type DeidentifiedNote, deidentifyNote } from '../../core/report/index.js';
import { type Result, refuse, success } from '../../core/result.js';
import { nodeDigest } from './nodeDigest.js';
import { readTextFile } from './readTextFile.js';

/** A shorter secret could be guessed, and then known UIDs be tried. */
const SHORTEST_SALT = 16;

/** De-identifies a note under the salt in a file, or under one of chance that is kept nowhere. */
export async function deidentifyForExport(
  note: Note,
  saltFile: string | undefined,
): Promise<Result<DeidentifiedNote>> {
  const digest = nodeDigest;
  if (saltFile === undefined) {
    const salt = randomBytes(32).toString('hex');
    return success(await deidentifyNote(note, { salt, digest }));
  }
  const text = await readTextFile(saltFile);
  if (!text.ok) return text;
  const salt = text.value.trim();
  if (salt.length < SHORTEST_SALT) {
    return refuse(
      'short-salt',
      `${visibleText(basename(saltFile))} holds ${salt.length} characters; a salt needs ${SHORTEST_SALT} or more of chance.`,
    );
  }
  return success(await deidentifyNote(note, { salt, digest }));
}
