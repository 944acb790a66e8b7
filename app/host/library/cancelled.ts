import { refuse } from '../../../core/result.js';

/** Whether a job was told to stop. A function, so that the compiler does not take the first answer for the last. */
export function isCancelled(signal: AbortSignal | undefined): boolean {
  return signal?.aborted === true;
}

/** The answer of a job that was told to stop. */
export function cancelled(): ReturnType<typeof refuse> {
  return refuse('cancelled', 'Cancelled.');
}
