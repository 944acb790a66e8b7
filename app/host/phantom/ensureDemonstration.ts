import { mkdir, readdir, readFile, rename } from 'node:fs/promises';
import { join } from 'node:path';
import { z } from 'zod';
import {
  DEMONSTRATION_VERSION,
  type DemonstrationOptions,
  SIDES,
} from '../../../core/phantom/demonstration/index.js';
import { type Result, success } from '../../../core/result.js';
import { fileErrorCode } from '../storage/fileError.js';
import { asRefusal } from './asRefusal.js';
import { fillFolder, TRUTH_FILE } from './fillFolder.js';
import type { Made } from './makeDemonstration.js';
import { type MakeOptions, wantedDemonstration } from './options.js';
import { withSiblingFolder } from './temporaryFolder.js';

export interface Ensured extends Made {
  readonly folder: string;
}

const StampSchema = z.object({
  stamp: z.object({
    version: z.number(),
    seed: z.number(),
    slices: z.number(),
    matrix: z.number(),
  }),
});

/**
 * The demonstration study in the data folder: made once and kept. A complete one of this version and these options
 * is used as it is; anything else in its place is replaced once the new one is whole. Refused with the code
 * 'cancelled' when the signal is aborted.
 */
export async function ensureDemonstration(
  dataDirectory: string,
  options: MakeOptions = {},
): Promise<Result<Ensured>> {
  const wanted = wantedDemonstration(options);
  if (!wanted.ok) return wanted;
  const folder = join(dataDirectory, 'demonstration');
  const ready = success({
    folder,
    files: wanted.value.slices * SIDES.length,
    truthFile: join(folder, TRUTH_FILE),
  });
  return asRefusal(options.signal, async () => {
    if (await isComplete(folder, wanted.value)) return ready;
    return withSiblingFolder(folder, async (sibling) => {
      const made = join(sibling, 'new');
      await mkdir(made, { mode: 0o700 });
      await fillFolder(made, wanted.value, options);
      try {
        await moveIfThere(folder, join(sibling, 'old'));
        await rename(made, folder);
      } catch (error) {
        // Another window may have put its own there in the meantime.
        if (!(await isComplete(folder, wanted.value))) throw error;
      }
      return ready;
    });
  });
}

async function moveIfThere(from: string, to: string): Promise<void> {
  try {
    await rename(from, to);
  } catch (error) {
    if (fileErrorCode(error) !== 'ENOENT') throw error;
  }
}

async function isComplete(folder: string, options: DemonstrationOptions): Promise<boolean> {
  try {
    const read = StampSchema.safeParse(
      JSON.parse(await readFile(join(folder, TRUTH_FILE), 'utf8')),
    );
    if (!read.success) return false;
    const { version, seed, slices, matrix } = read.data.stamp;
    const agrees =
      version === DEMONSTRATION_VERSION &&
      seed === options.seed &&
      slices === options.slices &&
      matrix === options.matrix;
    const counts = await Promise.all(
      SIDES.map(async (side) => (await readdir(join(folder, side))).length),
    );
    return agrees && counts.every((count) => count === options.slices);
  } catch (error) {
    // A truth file that is not there or not JSON is no demonstration; any other failure is not hidden.
    if (error instanceof SyntaxError || fileErrorCode(error) === 'ENOENT') return false;
    throw error;
  }
}
