import { availableParallelism } from 'node:os';
import { setImmediate } from 'node:timers/promises';
import { Piscina } from 'piscina';
import { workerFile } from '../workerFile.js';
import { type FileReading, readFileHeader } from './readFileHeader.js';

/** Reads headers of files by the batch. Rejects with an AbortError when its signal is aborted. */
export interface HeaderReader {
  read(paths: readonly string[], signal?: AbortSignal): Promise<readonly FileReading[]>;
  close(): Promise<void>;
}

/** A thread that has had nothing to read for so long ends, ms; until then the next folder finds it warm. */
const IDLE_MS = 30_000;

/** One thread less than there are processors, so that the host and the page keep theirs; four at most, one at least. */
export function usualThreads(): number {
  return Math.max(1, Math.min(4, availableParallelism() - 1));
}

/** A reader with so many worker threads; with none it reads in this thread, and lets others in between batches. */
export function createHeaderReader(threads: number): HeaderReader {
  return threads > 0 ? threadedReader(threads) : ownReader();
}

function threadedReader(threads: number): HeaderReader {
  const pool = new Piscina<readonly string[], readonly FileReading[]>({
    filename: workerFile('index.worker'),
    minThreads: 0,
    maxThreads: threads,
    idleTimeout: IDLE_MS,
  });
  return {
    read: (paths, signal) =>
      pool.run(paths, { name: 'readBatch', ...(signal === undefined ? {} : { signal }) }),
    close: () => pool.destroy(),
  };
}

function ownReader(): HeaderReader {
  return {
    async read(paths, signal) {
      await setImmediate();
      signal?.throwIfAborted();
      return paths.map(readFileHeader);
    },
    async close() {},
  };
}
