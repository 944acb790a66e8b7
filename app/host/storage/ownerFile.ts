import { randomBytes } from 'node:crypto';
import { chmod, mkdir, open, rename, rm } from 'node:fs/promises';
import { dirname } from 'node:path';

/** Makes a folder that only its owner may look into (mode 0700), with its parents. */
export async function ensureOwnerFolder(path: string): Promise<void> {
  await mkdir(path, { recursive: true, mode: 0o700 });
  await chmod(path, 0o700);
}

/**
 * Writes a whole file for its owner alone (mode 0600): a new file beside it, fsync, rename, fsync of
 * the folder. After a failure the old file is as it was. `FileHandle.writeFile` goes on after a short
 * write, so a disk that fills up in the middle is an error here and never a file cut short.
 */
export async function writeOwnerFile(path: string, content: string | Uint8Array): Promise<void> {
  const temporary = `${path}.${randomBytes(6).toString('hex')}.tmp`;
  const file = await open(temporary, 'wx', 0o600);
  try {
    try {
      await file.writeFile(content);
      await file.sync();
    } finally {
      await file.close();
    }
    await rename(temporary, path);
  } catch (error) {
    await rm(temporary, { force: true });
    throw error;
  }
  await syncFolder(dirname(path));
}

/** Windows can't open a folder to sync it; there the rename itself has to do. */
async function syncFolder(path: string): Promise<void> {
  if (process.platform === 'win32') return;
  const folder = await open(path, 'r');
  try {
    await folder.sync();
  } finally {
    await folder.close();
  }
}
