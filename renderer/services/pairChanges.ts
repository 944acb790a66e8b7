import { formatFixed } from '../../core/format/index.js';
import { LOWEST_IMAGE_HU } from '../../core/intensity/index.js';
import type { Result } from '../../core/result.js';
import type { KeptNote } from '../host/client.js';
import { type MeasuredPair, swappedPair } from '../pairing/measuredPair.js';
import type { PairState } from '../state/appState.js';
import { samePlaces, swapPlates } from '../state/changes/assessment.js';
import { platesOnSlices } from '../state/changes/cut.js';
import type { Store } from '../state/store.js';
import type { Autosave } from './autosave.js';
import type { Candidate } from './choosePair.js';
import { isMasked, withMaskTurned } from './masking.js';

/** Shows a pair, with the note that was found for it and what is known of it, if any. */
export type UsePair = (
  candidate: Candidate,
  chosenBy: PairState['chosenBy'],
  found?: Result<KeptNote | undefined>,
  known?: MeasuredPair,
) => Promise<void>;

export interface PairChangesOptions {
  readonly store: Store;
  readonly autosave: Pick<Autosave, 'settled'>;
  readonly usePair: UsePair;
  readonly warn: (text: string) => void;
}

/** Changes of the pair that is shown, after which it is shown anew with the plates where they were. */
export interface PairChanges {
  /** Soft and sharp change places. */
  swap(chosenBy: 'measure' | 'reader'): Promise<void>;
  /** Unmarked padding is left out, or taken in again: everything that was measured changes with it. */
  turnMask(): Promise<void>;
}

const MASK_ON = `Values below ${formatFixed(LOWEST_IMAGE_HU, 0)} HU are left out as no image on both stacks; the note says so.`;
const MASK_OFF = 'Nothing is left out any more but what the files mark as padding.';

export function createPairChanges({
  store,
  autosave,
  usePair,
  warn,
}: PairChangesOptions): PairChanges {
  return {
    swap: async (chosenBy) => {
      const { pair, compare, assessment } = store.now();
      const plates = platesOnSlices(store.now());
      if (pair?.sharp === undefined) return;
      const known = assessment.kind === 'done' ? swappedPair(assessment.measured) : undefined;
      const { soft, sharp, overrides } = pair;
      await autosave.settled();
      if (store.now().pair?.soft !== soft) return;
      await usePair({ soft: sharp, sharp: soft, overrides }, chosenBy, undefined, known);
      store.change('Places as before', (state) => ({ ...swapPlates(plates)(state), compare }));
    },
    turnMask: async () => {
      const { pair, index, compare } = store.now();
      const plates = platesOnSlices(store.now());
      if (pair === undefined || index === undefined) return;
      const turned = withMaskTurned(pair, index.stacks);
      if (!turned.ok) {
        warn(turned.refusal.text);
        return;
      }
      await autosave.settled();
      if (store.now().pair?.soft !== pair.soft) return;
      await usePair(turned.value, pair.chosenBy);
      store.change('Places as before', (state) => ({
        ...samePlaces(plates)(state),
        compare,
        message: { tone: 'plain', text: isMasked(pair) ? MASK_OFF : MASK_ON },
      }));
    },
  };
}
