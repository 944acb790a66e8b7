import { type Result, refuse } from '../../../core/result.js';
import { fileErrorReason } from '../storage/fileError.js';

/** Runs a job that writes; a cancelled job and a failed file operation become refusals, other errors go on. */
export async function asRefusal<T>(
  signal: AbortSignal | undefined,
  job: () => Promise<Result<T>>,
): Promise<Result<T>> {
  try {
    return await job();
  } catch (error) {
    if (signal?.aborted === true)
      return refuse('cancelled', 'Making the demonstration study was cancelled.');
    const reason = fileErrorReason(error);
    if (reason === undefined) throw error;
    return refuse(
      'demonstration-not-written',
      `The demonstration study could not be written: ${reason}.`,
    );
  }
}
