import { wrap } from 'comlink';
import type { DecodeAnswer, DecodeRequest, DecodeWorker } from './decodeRequest.js';

/** A few workers that decode slices. */
export interface WorkerPool {
  readonly size: number;
  /** Gives a request to a worker that has nothing to do; call it only `size` times at once. */
  decode(request: DecodeRequest): Promise<DecodeAnswer>;
  /** Ends the workers and whatever they are doing. */
  close(): void;
}

/** One core is left to the page itself; more than four workers wait for the disk. */
export function poolSize(cores: number): number {
  return Math.min(Math.max(cores - 1, 1), 4);
}

export function createWorkerPool(
  size: number = poolSize(navigator.hardwareConcurrency),
): WorkerPool {
  const closing = new AbortController();
  const workers = Array.from({ length: size }, () => {
    const worker = new Worker(new URL('./decode.worker.ts', import.meta.url), { type: 'module' });
    return { worker, remote: wrap<DecodeWorker>(worker), stopped: stopOf(worker, closing.signal) };
  });
  const idle = [...workers];
  return {
    size,
    decode: async (request) => {
      const free = idle.pop();
      if (free === undefined)
        throw new Error(`invalid use of a pool: all ${size} workers are busy`);
      try {
        return await Promise.race([free.remote.decode(request), free.stopped]);
      } finally {
        idle.push(free);
      }
    },
    close: () => {
      closing.abort();
      for (const { worker } of workers) worker.terminate();
    },
  };
}

/** What a worker answers once its own program fails or it is ended: it would otherwise never answer again. */
function stopOf(worker: Worker, closing: AbortSignal): Promise<DecodeAnswer> {
  return new Promise((resolve) => {
    const stop = (text: string) => () => resolve({ ok: false, text });
    worker.addEventListener('error', stop('The decoder stopped working. Open the folder again.'));
    closing.addEventListener('abort', stop('Given up.'));
  });
}
