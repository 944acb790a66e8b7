import { proxy, wrap } from 'comlink';
import type { PairOverride } from '../../core/note/index.js';
import { type Result, refuse, success } from '../../core/result.js';
import type { Stack } from '../../core/stack/index.js';
import type { HostClient } from '../host/client.js';
import type { AssessWorker, FrameOf, OnProgress } from '../pairing/assessRequest.js';
import type { MeasuredPair } from '../pairing/measuredPair.js';
import type { Proposal } from '../pairing/proposal.js';

/** Measures pairs beside the page, so that no frame waits for it. Each call can be given up by its signal. */
export interface Assessor {
  assess(
    pair: { readonly soft: Stack; readonly sharp: Stack },
    overrides: readonly PairOverride[],
    work: AssessWork,
  ): Promise<Result<MeasuredPair>>;
  propose(stacks: readonly Stack[], work: AssessWork): Promise<Result<readonly Proposal[]>>;
}

export interface AssessWork {
  readonly grant: string;
  readonly onProgress: OnProgress;
  readonly signal: AbortSignal;
}

const GIVEN_UP = 'given-up';

/** True for the refusal of work that was given up: nobody needs to be told. */
export function wasGivenUp(result: Result<unknown>): boolean {
  return !result.ok && result.refusal.code === GIVEN_UP;
}

export function createAssessor(client: Pick<HostClient, 'frame'>): Assessor {
  const inWorker = async <T>(
    { grant, onProgress, signal }: AssessWork,
    call: (remote: AssessWorker, frameOf: FrameOf, onProgress: OnProgress) => Promise<T>,
  ): Promise<Result<T>> => {
    if (signal.aborted) return refuse(GIVEN_UP, 'Given up.');
    const worker = new Worker(new URL('../pairing/assess.worker.ts', import.meta.url), {
      type: 'module',
    });
    const remote = wrap<AssessWorker>(worker);
    const frameOf: FrameOf = (fileId, frame) => client.frame(grant, fileId, frame);
    const stopped = new Promise<Result<T>>((resolve) => {
      signal.addEventListener('abort', () => resolve(refuse(GIVEN_UP, 'Given up.')), {
        once: true,
      });
      worker.addEventListener('error', () =>
        resolve(refuse('worker-failed', 'The measuring of the pair stopped working.')),
      );
    });
    try {
      const done = call(remote as unknown as AssessWorker, proxy(frameOf), proxy(onProgress));
      return await Promise.race([done.then(success), stopped]);
    } finally {
      worker.terminate();
    }
  };
  return {
    assess: ({ soft, sharp }, overrides, work) =>
      inWorker(work, (remote, frameOf, onProgress) =>
        remote.assess(soft, sharp, overrides, frameOf, onProgress),
      ),
    propose: (stacks, work) =>
      inWorker(work, (remote, frameOf, onProgress) => remote.propose(stacks, frameOf, onProgress)),
  };
}
