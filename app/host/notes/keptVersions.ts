import { readdir, rm } from 'node:fs/promises';
import { join } from 'node:path';
import { ensureOwnerFolder, writeOwnerFile } from '../storage/ownerFile.js';

/** So many earlier versions of a note are kept. */
export const KEPT_VERSIONS = 20;

const NAME = /^(\d{8})\.json$/;

/** Puts a version among the earlier ones, numbered on from the last, and drops the oldest beyond twenty. */
export async function keepVersion(folder: string, bytes: Uint8Array): Promise<void> {
  await ensureOwnerFolder(folder);
  const before = (await readdir(folder))
    .map((name) => NAME.exec(name)?.[1])
    .filter((number) => number !== undefined)
    .sort();
  const next = String(Number(before.at(-1) ?? 0) + 1).padStart(8, '0');
  await writeOwnerFile(join(folder, `${next}.json`), bytes);
  for (const old of before.slice(0, Math.max(0, before.length + 1 - KEPT_VERSIONS))) {
    await rm(join(folder, `${old}.json`), { force: true });
  }
}
