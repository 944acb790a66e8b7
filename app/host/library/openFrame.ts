import { type FileHandle, open, realpath } from 'node:fs/promises';
import { join } from 'node:path';
import { type Result, refuse, success } from '../../../core/result.js';
import { isContained } from '../folders/contained.js';
import { fileErrorCode, fileErrorReason } from '../storage/fileError.js';
import { type FileStamp, OPEN_FLAGS } from './readFileHeader.js';

/** An open file of a folder. Whoever gets it closes it. */
export interface OpenFrame {
  readonly file: FileHandle;
  readonly size: number;
}

/**
 * Opens a file of a folder that was opened. Where the path really leads is asked anew each time, and it
 * must lie in the folder. With a stamp, a file that changed since is refused: its pixels may no longer
 * fit the geometry and the rescale that were read from its header.
 */
export async function openFrame(
  root: string,
  path: string,
  stamp?: FileStamp,
): Promise<Result<OpenFrame>> {
  let file: FileHandle | undefined;
  try {
    const real = await realpath(join(root, path));
    if (!isContained(root, real)) {
      return refuse(
        'outside-folder',
        'This file leads out of the opened folder, so it was not read.',
      );
    }
    file = await open(real, OPEN_FLAGS);
    const found = await file.stat();
    const refusal = refusalOf(found.isFile(), found, stamp);
    if (refusal === undefined) return success({ file, size: found.size });
    await file.close();
    return refusal;
  } catch (error) {
    await file?.close();
    return refusalOfError(error);
  }
}

function refusalOf(
  isFile: boolean,
  found: FileStamp,
  stamp: FileStamp | undefined,
): ReturnType<typeof refuse> | undefined {
  if (!isFile) return refuse('file-changed', 'This is no longer an ordinary file.');
  if (stamp !== undefined && (stamp.size !== found.size || stamp.mtimeMs !== found.mtimeMs)) {
    return refuse(
      'file-changed',
      'This file changed after the folder was read. Open the folder again.',
    );
  }
  return undefined;
}

function refusalOfError(error: unknown): ReturnType<typeof refuse> {
  const reason = fileErrorReason(error);
  if (reason === undefined) throw error;
  const gone = fileErrorCode(error) === 'ENOENT' || fileErrorCode(error) === 'ENOTDIR';
  return gone
    ? refuse('vanished', 'This file is no longer there. Open the folder again.')
    : refuse('unreadable-file', `This file can’t be read: ${reason}.`);
}
