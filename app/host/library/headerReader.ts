import { availableParallelism } from 'node:os';
import { setImmediate } from 'node:timers/promises';
import { Piscina } from 'piscina';
import type { ReadOptions } from '../../../core/dicom/index.js';
import { workerFile } from '../workerFile.js';
import { type Batch, readBatch } from './readBatch.js';
import type { FileReading } from './readFileHeader.js';

/** Reads headers of files by the batch. Rejects with an AbortError when its signal is aborted. */
export interface HeaderReader {
  /** Batches that keep it busy: more of them at once only wait. */
  readonly lanes: number;
  read(
    paths: readonly string[],
    signal?: AbortSignal,
    options?: ReadOptions,
  ): Promise<readonly FileReading[]>;
  /** Starts its threads, so that the first folder does not wait for them. */
  warm(): Promise<void>;
  close(): Promise<void>;
}

/** A thread that has had nothing to read for so long ends, ms; until then the next folder finds it warm. */
const IDLE_MS = 30_000;

/** As many threads as there are processors, four at most: while headers are read the host and the page only wait. */
export function usualThreads(): number {
  return Math.min(4, availableParallelism());
}

/** A reader with so many worker threads; with none it reads in this thread, and lets others in between batches. */
export function createHeaderReader(threads: number): HeaderReader {
  return threads > 0 ? threadedReader(threads) : ownReader();
}

function threadedReader(threads: number): HeaderReader {
  const pool = new Piscina<Batch, readonly FileReading[]>({
    filename: workerFile('index.worker'),
    minThreads: 0,
    maxThreads: threads,
    idleTimeout: IDLE_MS,
  });
  return {
    // One is read while the next one is on its way.
    lanes: 2 * threads,
    read: (paths, signal, options = {}) =>
      pool.run(
        { paths, options },
        { name: 'readBatch', ...(signal === undefined ? {} : { signal }) },
      ),
    async warm() {
      const empty = Array.from({ length: threads }, () =>
        pool.run({ paths: [], options: {} }, { name: 'readBatch' }),
      );
      await Promise.all(empty);
    },
    close: () => pool.destroy(),
  };
}

function ownReader(): HeaderReader {
  return {
    lanes: 1,
    async read(paths, signal, options = {}) {
      await setImmediate();
      signal?.throwIfAborted();
      return readBatch({ paths, options });
    },
    async warm() {},
    async close() {},
  };
}
