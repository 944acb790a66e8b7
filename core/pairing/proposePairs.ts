import type { Stack } from '../stack/index.js';
import { type AssessOptions, assessPair, type DetailedAssessment } from './assessPair.js';
import { type Candidate, candidatesOf, isShort, pairsOf } from './candidates.js';
import type { ReadSlice } from './contract.js';
import { grainHu, sharedMiddleMm } from './grain.js';
import { keptSlices } from './keptSlices.js';
import { compareKeys, type RankedPair, rankPairs } from './rankPairs.js';
import { commonStepMm } from './registrationPlaces.js';

export interface ProposeOptions extends Pick<AssessOptions, 'measureSharpness'> {
  /** When it is aborted, the pairs that were assessed so far are returned. */
  readonly signal?: { readonly aborted: boolean };
  readonly onProgress?: (progress: {
    readonly done: number;
    readonly total: number;
    readonly text: string;
  }) => void;
  /** Pairs whose pixels are looked at, at most; 6 by default. The others are ranked by their headers alone. */
  readonly most?: number;
}

const MOST = 6;
/** Refused pairs are told only where there is nothing else, and no more of them than anyone reads. */
const MOST_REFUSED = 6;

/**
 * Pairs of stacks that are worth reading as soft and sharp, best first. Candidates are two stacks of one patient and
 * study whose headers don't refuse them: phases are never crossed, patients never mixed. They are ranked by headers; the
 * pixels of the most promising ones are looked at, a few slices of each stack. Only where nothing is left are the refused
 * ones returned, so that the reader learns why.
 */
export async function proposePairs(
  stacks: readonly Stack[],
  read: ReadSlice,
  options: ProposeOptions = {},
): Promise<readonly DetailedAssessment[]> {
  const { signal, onProgress, most = MOST } = options;
  const candidates = candidatesOf(stacks).filter(({ header }) => header.verdict !== 'refused');
  if (candidates.length === 0) return refusedPairs(stacks);
  const kept = keptSlices(read);
  const promising = await mostPromising(candidates, most, kept);
  const assessed = new Map<Candidate, DetailedAssessment>();
  for (const [done, candidate] of promising.entries()) {
    if (signal?.aborted) break;
    onProgress?.({ done, total: promising.length, text: 'Comparing stacks' });
    const { first, second } = candidate;
    assessed.set(candidate, await assessPair(first, second, kept, options));
  }
  const ranked = candidates.map(
    (candidate): RankedPair => ({
      candidate,
      assessment: assessed.get(candidate) ?? candidate.header,
    }),
  );
  return rankPairs(ranked).map(({ assessment }) => assessment);
}

/** The candidates to look at: by their headers, and where that leaves too many those first that differ most in grain. */
async function mostPromising(
  candidates: readonly Candidate[],
  most: number,
  read: ReadSlice,
): Promise<readonly Candidate[]> {
  const contrast =
    candidates.length > most ? await grainContrast(candidates, read) : new Map<Candidate, number>();
  const keyed = candidates.map((candidate) => ({
    candidate,
    key: [
      isShort(candidate, candidates) ? 1 : 0,
      candidate.header.reservations.length,
      -(contrast.get(candidate) ?? 0),
      -Math.round(candidate.commonMm),
      candidate.order,
    ],
  }));
  keyed.sort((a, b) => compareKeys(a.key, b.key));
  return keyed.slice(0, most).map(({ candidate }) => candidate);
}

/** How much two stacks differ in grain: the size of the logarithm of its ratio, in steps of a tenth. */
async function grainContrast(
  candidates: readonly Candidate[],
  read: ReadSlice,
): Promise<ReadonlyMap<Candidate, number>> {
  const stacks = [...new Set(candidates.flatMap(({ first, second }) => [first, second]))];
  const alongMm = sharedMiddleMm(stacks) ?? 0;
  const stepMm = Math.max(
    ...stacks.map(({ slices: [{ image }] }) => commonStepMm(image.grid, image.grid)),
  );
  const grain = new Map<Stack, number>();
  for (const stack of stacks) {
    const found = await grainHu(stack, alongMm, stepMm, read);
    if (found !== undefined && found > 0) grain.set(stack, found);
  }
  return new Map(
    candidates.map((candidate) => {
      const [a, b] = [grain.get(candidate.first), grain.get(candidate.second)];
      const ratio = a === undefined || b === undefined ? 0 : Math.abs(Math.log(a / b));
      return [candidate, Math.round(ratio * 10)];
    }),
  );
}

/** What is refused, those first that a reason of the reader could make a pair. */
function refusedPairs(stacks: readonly Stack[]): readonly DetailedAssessment[] {
  const pairs = pairsOf(stacks).map((candidate) => ({
    candidate,
    key: [candidate.header.refusedFor.length, -candidate.commonSlices, candidate.order],
  }));
  pairs.sort((a, b) => compareKeys(a.key, b.key));
  return pairs.slice(0, MOST_REFUSED).map(({ candidate }) => candidate.header);
}
