import { lstat } from 'node:fs/promises';
import { join } from 'node:path';
import type { JobOptions } from '../services.js';
import { fileErrorCode } from '../storage/fileError.js';
import type { CachedReadings } from './cachedHeaders.js';
import { isCancelled } from './cancelled.js';
import type { FileState } from './readFileHeader.js';

/** Files asked for at once: enough to keep the system's own threads busy. */
const AT_ONCE = 16;

/** Progress is told after so many more files. */
const TELL_EACH = 500;

/** Those of the files that are still as they were when they were read. No file is opened. */
export async function unchangedFiles(
  root: string,
  files: readonly string[],
  kept: CachedReadings,
  { signal, onProgress }: JobOptions,
): Promise<ReadonlySet<string>> {
  const unchanged = new Set<string>();
  let next = 0;
  let done = 0;
  const lane = async (): Promise<void> => {
    while (next < files.length && !isCancelled(signal)) {
      const file = files[next++] ?? '';
      const known = kept.get(file)?.stamp;
      if (known !== undefined && (await isInState(join(root, file), known))) unchanged.add(file);
      done += 1;
      if (done % TELL_EACH === 0) {
        const text = `Looking for changes: ${done} of ${files.length}`;
        onProgress?.({ done, total: files.length, text });
      }
    }
  };
  if (kept.size > 0) await Promise.all(Array.from({ length: AT_ONCE }, lane));
  return unchanged;
}

/** False where the state can't be asked for: reading the file then says why. */
async function isInState(path: string, known: FileState): Promise<boolean> {
  try {
    const found = await lstat(path);
    return (
      found.isFile() &&
      found.size === known.size &&
      found.mtimeMs === known.mtimeMs &&
      found.ctimeMs === known.ctimeMs &&
      found.ino === known.ino
    );
  } catch (error) {
    if (fileErrorCode(error) === undefined) throw error;
    return false;
  }
}
