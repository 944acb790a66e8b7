import { readdir, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { fileErrorReason } from './fileError.js';

/** A write takes milliseconds: what is older was left by a process that was killed in the middle of it. */
const LEFT_BEHIND_MS = 60_000;

/** Removes temporary files that killed writers have left in a folder. What can't be removed stays: it does no harm. */
export async function removeLeftovers(folder: string, nowMs: number): Promise<void> {
  for (const name of await readdir(folder)) {
    if (!/\.[0-9a-f]{12}\.tmp$/.test(name)) continue;
    const path = join(folder, name);
    try {
      if (nowMs - (await stat(path)).mtimeMs > LEFT_BEHIND_MS) await rm(path, { force: true });
    } catch (error) {
      if (fileErrorReason(error) === undefined) throw error;
    }
  }
}
