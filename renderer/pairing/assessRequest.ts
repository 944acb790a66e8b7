import type { Progress } from '../../app/host/contract.js';
import type { PairOverride } from '../../core/note/index.js';
import type { Stack } from '../../core/stack/index.js';
import type { FrameRequest } from '../host/client.js';
import type { MeasuredPair } from './measuredPair.js';
import type { Proposal } from './proposal.js';

/** What the worker asks the page while it works: where a slice's bytes are. */
export type FrameOf = (fileId: number, frame: number | undefined) => FrameRequest;

/** Called when the work has come further. */
export type OnProgress = (progress: Progress) => void;

/** The worker that measures pairs, as the page sees it. It fetches the few slices that it needs by itself. */
export interface AssessWorker {
  /** Measures two stacks; the first lies on the soft plate. */
  assess(
    soft: Stack,
    sharp: Stack,
    overrides: readonly PairOverride[],
    frameOf: FrameOf,
    onProgress: OnProgress,
  ): Promise<MeasuredPair>;
  /** Pairs among the stacks, best first. */
  propose(
    stacks: readonly Stack[],
    frameOf: FrameOf,
    onProgress: OnProgress,
  ): Promise<readonly Proposal[]>;
}
