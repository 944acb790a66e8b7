/** Runs pieces of work one after another, so that none sees a file half changed by another. */
export interface Queue {
  run<T>(work: () => Promise<T>): Promise<T>;
  /** Resolves when all work that was given so far has ended, well or not. */
  settled(): Promise<void>;
}

/** An empty queue. A piece that fails rejects its own promise and does not stop those behind it. */
export function createQueue(): Queue {
  let last: Promise<unknown> = Promise.resolve();
  return {
    run(work) {
      const result = last.then(work);
      last = result.catch(() => undefined);
      return result;
    },
    async settled() {
      await last;
    },
  };
}
