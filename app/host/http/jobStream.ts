import type { Result } from '../../../core/result.js';
import type { JobFailure } from '../contract.js';
import type { JobOptions } from '../services.js';
import { eventStream } from './eventStream.js';

/** Runs a long job behind a stream of events: 'progress' as it goes, then one of 'done' and 'failed'. */
export function jobStream<T>(
  signal: AbortSignal,
  report: (error: unknown) => void,
  job: (options: JobOptions) => Promise<Result<T>>,
): Response {
  return eventStream({
    signal,
    onError: report,
    async run(send, gone) {
      const failed = (failure: JobFailure): void => send('failed', failure);
      try {
        const result = await job({
          signal: gone,
          onProgress: (progress) => send('progress', progress),
        });
        if (result.ok) send('done', result.value);
        else failed({ code: result.refusal.code, text: result.refusal.text });
      } catch (error) {
        report(error);
        failed(INTERNAL);
      }
    },
  });
}

/** What the page hears of a mistake of the program itself; the details go to the program's own report. */
export const INTERNAL: JobFailure = {
  code: 'internal',
  text: 'Diptych made a mistake and could not go on with this. Try again; if it stays, restart Diptych.',
};
