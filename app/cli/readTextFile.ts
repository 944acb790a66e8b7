import { readFile, stat } from 'node:fs/promises';
import { basename } from 'node:path';
import { visibleText } from '../../core/format/index.js';
import { type Result, refuse, success } from '../../core/result.js';
import { fileErrorReason } from '../host/storage/fileError.js';

/** Larger than any plan or note; keeps a mistyped path to an image archive from filling the memory. */
const MOST_BYTES = 64 * 1024 * 1024;

/** Reads a text file that the user named. */
export async function readTextFile(path: string): Promise<Result<string>> {
  const name = visibleText(basename(path));
  try {
    const { size } = await stat(path);
    if (size > MOST_BYTES) return refuse('too-large', `${name} is too large for a plan or a note.`);
    return success(await readFile(path, 'utf8'));
  } catch (error) {
    const reason = fileErrorReason(error);
    if (reason === undefined) throw error;
    return refuse('file-not-read', `${name} can’t be read: ${reason}.`);
  }
}
