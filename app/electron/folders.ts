import { stat } from 'node:fs/promises';
import { dirname } from 'node:path';
import { fileErrorCode } from '../host/storage/fileError.js';

/**
 * The folder meant by a path that was dropped, named on the command line or handed over by the
 * system: for a file the folder in which it lies, since a study is a folder. A path that can't be
 * looked at comes back as it is; opening it tells the reader why.
 */
export async function folderOf(path: string): Promise<string> {
  try {
    return (await stat(path)).isFile() ? dirname(path) : path;
  } catch (error) {
    if (fileErrorCode(error) === undefined) throw error;
    return path;
  }
}
