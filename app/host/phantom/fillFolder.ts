import { setMaxListeners } from 'node:events';
import { mkdir } from 'node:fs/promises';
import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { Piscina } from 'piscina';
import { type DemonstrationOptions, SIDES } from '../../../core/phantom/demonstration/index.js';
import { workerFile } from '../workerFile.js';
import type { MakeOptions } from './options.js';
import type { SliceTask } from './phantom.worker.js';

export const TRUTH_FILE = 'truth.json';

/** More threads than this gain little: each holds a sinogram and an image. */
const MOST_THREADS = 8;

/**
 * Makes all files of a demonstration in an empty folder, and returns the number of DICOM files. Rejects when the
 * signal is aborted; by then no thread writes any more.
 */
export async function fillFolder(
  folder: string,
  wanted: DemonstrationOptions,
  { worker, onProgress, signal }: Pick<MakeOptions, 'worker' | 'onProgress' | 'signal'>,
): Promise<number> {
  signal?.throwIfAborted();
  // Each slice that waits for a thread listens for the end of it all.
  if (signal !== undefined) setMaxListeners(wanted.slices + 10, signal);
  for (const side of SIDES) await mkdir(join(folder, side), { mode: 0o700 });
  const pool = new Piscina({
    filename: worker ?? workerFile('phantom.worker'),
    maxThreads: Math.min(MOST_THREADS, availableParallelism()),
  });
  try {
    let done = 0;
    const report = (): void =>
      onProgress?.({ done, total: wanted.slices, text: 'Making the demonstration study' });
    report();
    const runOptions = signal === undefined ? {} : { signal };
    const counts = await Promise.all(
      Array.from({ length: wanted.slices }, async (_, index) => {
        const task: SliceTask = { directory: folder, options: wanted, index };
        const count: number = await pool.run(task, { name: 'slice', ...runOptions });
        done += 1;
        report();
        return count;
      }),
    );
    const truthTask = { file: join(folder, TRUTH_FILE), options: wanted };
    await pool.run(truthTask, { name: 'truth', ...runOptions });
    return counts.reduce((sum, count) => sum + count, 0);
  } finally {
    // Ends the threads before the caller removes the folder that they write into.
    await pool.destroy();
  }
}
