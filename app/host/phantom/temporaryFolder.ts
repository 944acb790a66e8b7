import { mkdir, mkdtemp, rm } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';

/**
 * Runs work in a new folder beside `directory`, for the owner alone, so that the result can be put in place with
 * one rename. Whatever is left of the folder afterwards is removed.
 */
export async function withSiblingFolder<T>(
  directory: string,
  work: (folder: string) => Promise<T>,
): Promise<T> {
  const parent = dirname(directory);
  await mkdir(parent, { recursive: true, mode: 0o700 });
  const folder = await mkdtemp(join(parent, `.${basename(directory)}-unfinished-`));
  try {
    return await work(folder);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}
