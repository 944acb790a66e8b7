import type { JobFailure, Progress } from '../../app/host/contract.js';
import { type Result, refuse, success } from '../../core/result.js';
import { readEventStream } from './eventStream.js';
import { failedRequest, type HostRequest, send, type Transport } from './transport.js';

/**
 * Follows a long job of the host to its end. The job's stream says 'progress' any number of times and then
 * 'done' or 'failed' once; a stream that ends without either is a refusal.
 */
export async function followJob<T>(
  transport: Transport,
  request: HostRequest,
  onProgress: (progress: Progress) => void,
): Promise<Result<T>> {
  const answer = await send(transport, request);
  if (!answer.ok) return answer;
  if (answer.value.body === null) return refuse('no-answer', 'The job gave no answer.');
  let outcome: Result<T> = refuse('no-end', 'The job stopped before it was done. Try it again.');
  try {
    await readEventStream(answer.value.body, ({ name, data }) => {
      if (name === 'progress') onProgress(JSON.parse(data) as Progress);
      if (name === 'done') outcome = success(JSON.parse(data) as T);
      if (name === 'failed') outcome = { ok: false, refusal: JSON.parse(data) as JobFailure };
    });
  } catch (error) {
    return failedRequest(error, request.signal);
  }
  return outcome;
}
