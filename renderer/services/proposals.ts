import type { Stack } from '../../core/stack/index.js';
import type { Store } from '../state/store.js';
import { type Assessor, wasGivenUp } from './assessor.js';
import { type Candidate, candidateOfProposal } from './choosePair.js';
import type { Jobs } from './jobs.js';

export interface ProposalsOptions {
  readonly store: Store;
  readonly assessor: Pick<Assessor, 'propose'>;
  readonly jobs: Jobs;
}

/**
 * Looks for pairs among the stacks of a folder; keeps them for the dialog, and gives the best one if it is a plain
 * pair. `given` gives the looking up.
 */
export type FindPairs = (
  stacks: readonly Stack[],
  grant: string,
  given?: AbortSignal,
) => Promise<Candidate | undefined>;

export function createFindPairs({ store, assessor, jobs }: ProposalsOptions): FindPairs {
  return async (stacks, grant, given) => {
    const job = await jobs.begin('Looking for pairs');
    if (job === undefined) return undefined;
    const running = given === undefined ? job : AbortSignal.any([job, given]);
    const onProgress = jobs.progress(running);
    const found = await assessor.propose(stacks, { grant, onProgress, signal: running });
    // Other work that has begun in the meantime has a line of progress of its own.
    if (!job.aborted) jobs.end();
    if (running.aborted) return undefined;
    if (!found.ok) {
      const { text } = found.refusal;
      if (!wasGivenUp(found)) {
        store.change('Warn', (state) => ({ ...state, message: { tone: 'warning', text } }));
      }
      return undefined;
    }
    store.change('Pairs found', (state) => ({ ...state, proposals: found.value }));
    const [best] = found.value;
    return best?.verdict === 'pair' ? candidateOfProposal(best, stacks) : undefined;
  };
}
