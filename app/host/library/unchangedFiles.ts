import { lstat } from 'node:fs/promises';
import { join } from 'node:path';
import { fileErrorCode } from '../storage/fileError.js';
import type { CachedReadings } from './cachedHeaders.js';
import { isCancelled } from './cancelled.js';
import type { FileState } from './readFileHeader.js';

/** Files asked for at once: enough to keep the system's own threads busy. */
const AT_ONCE = 16;

/** Those of the files that are still as they were when they were read. No file is opened. */
export async function unchangedFiles(
  root: string,
  files: readonly string[],
  kept: CachedReadings,
  signal: AbortSignal | undefined,
): Promise<ReadonlySet<string>> {
  const unchanged = new Set<string>();
  let next = 0;
  const lane = async (): Promise<void> => {
    while (next < files.length && !isCancelled(signal)) {
      const file = files[next++] ?? '';
      const known = kept.get(file)?.stamp;
      if (known !== undefined && (await isInState(join(root, file), known))) unchanged.add(file);
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
