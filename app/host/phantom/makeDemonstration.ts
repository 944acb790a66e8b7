import { readdir, rename, rmdir } from 'node:fs/promises';
import { join } from 'node:path';
import { type Result, refuse, success } from '../../../core/result.js';
import { fileErrorCode } from '../storage/fileError.js';
import { asRefusal } from './asRefusal.js';
import { fillFolder, TRUTH_FILE } from './fillFolder.js';
import { type MakeOptions, wantedDemonstration } from './options.js';
import { withSiblingFolder } from './temporaryFolder.js';

export interface Made {
  /** DICOM files written. */
  readonly files: number;
  readonly truthFile: string;
}

/**
 * Makes the demonstration study: DICOM files in the folders soft and sharp, and truth.json. It is made beside
 * `directory` and put there when it is complete; an empty folder may be there before, anything else is refused.
 * Refused with the code 'cancelled' when the signal is aborted; then nothing is left behind.
 */
export async function makeDemonstration(
  directory: string,
  options: MakeOptions = {},
): Promise<Result<Made>> {
  const wanted = wantedDemonstration(options);
  if (!wanted.ok) return wanted;
  return asRefusal(options.signal, async () => {
    if (!(await isFree(directory)))
      return refuse(
        'folder-not-empty',
        'The folder for the demonstration is not empty. Choose a new or an empty folder.',
      );
    return withSiblingFolder(directory, async (folder) => {
      const files = await fillFolder(folder, wanted.value, options);
      await putInPlace(folder, directory);
      return success({ files, truthFile: join(directory, TRUTH_FILE) });
    });
  });
}

/** Whether nothing, or an empty folder, is there. */
async function isFree(directory: string): Promise<boolean> {
  try {
    return (await readdir(directory)).length === 0;
  } catch (error) {
    if (fileErrorCode(error) === 'ENOENT') return true;
    throw error;
  }
}

async function putInPlace(folder: string, directory: string): Promise<void> {
  try {
    // Not every system renames over an empty folder.
    await rmdir(directory);
  } catch (error) {
    if (fileErrorCode(error) !== 'ENOENT') throw error;
  }
  await rename(folder, directory);
}
