import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import {
  type DemonstrationOptions,
  demonstrationTruth,
  makeSlice,
} from '../../../core/phantom/demonstration/index.js';

/** One slice to make and to write below a folder that has the folders of both kernels. */
export interface SliceTask {
  readonly directory: string;
  readonly options: DemonstrationOptions;
  readonly index: number;
}

/** Makes one slice with both kernels and writes its files, for the owner alone. Returns how many. */
export async function slice({ directory, options, index }: SliceTask): Promise<number> {
  const files = makeSlice(options, index);
  for (const { path, bytes } of files)
    await writeFile(join(directory, path), bytes, { mode: 0o600, flag: 'wx' });
  return files.length;
}

/** Writes the truth file. It comes last: where it is, the slices are too. */
export async function truth({
  file,
  options,
}: {
  readonly file: string;
  readonly options: DemonstrationOptions;
}): Promise<void> {
  const text = `${JSON.stringify(demonstrationTruth(options), undefined, 1)}\n`;
  await writeFile(file, text, { mode: 0o600, flag: 'wx' });
}
