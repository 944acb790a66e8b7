import type { Progress } from '../../app/host/contract.js';
import type { Note } from '../../core/note/index.js';
import type { MeasuredPair } from '../pairing/measuredPair.js';
import type { AppState, PairState } from '../state/appState.js';
import { KEEP_MEASURED, keepMeasured } from '../state/changes/assessment.js';
import type { Store } from '../state/store.js';
import { type Assessor, wasGivenUp } from './assessor.js';
import { pairMessage } from './pairMessage.js';

export interface AssessmentOptions {
  readonly store: Store;
  readonly assessor: Pick<Assessor, 'assess'>;
  /** Present time, ISO 8601. */
  readonly now: () => string;
  /** The measure is there, and kept. */
  readonly onMeasured: () => void;
  /** The measure is there, and says that soft and sharp should change places; nothing is marked and nobody has chosen. */
  readonly onWrongOrder: () => void;
}

/** The measuring of the pair on the plates. */
export interface AssessmentWork {
  /** Measures the pair; call it once its first images are shown. Ends with the signal. */
  begin(pair: PairState, grant: string, signal: AbortSignal): void;
  cancel(): void;
}

export function createAssessment(options: AssessmentOptions): AssessmentWork {
  const { store, assessor } = options;
  let running = new AbortController();
  const tell = (assessment: AppState['assessment']): void =>
    store.change('Measure the pair', (state) => ({ ...state, assessment }));

  const finish = (measured: MeasuredPair): void => {
    const before = store.now().pair;
    store.change(KEEP_MEASURED, keepMeasured(measured, options.now()));
    options.onMeasured();
    const { pair, note } = store.now();
    if (pair !== undefined && isWrongOrder(pair, measured) && mayReorder(pair, note)) {
      options.onWrongOrder();
    }
    if (before !== undefined && isOrderConfirmed(before, measured)) {
      const asked = pairMessage(before)?.text;
      store.change('Order confirmed', (state) =>
        state.message?.text === asked ? { ...state, message: undefined } : state,
      );
    }
  };

  return {
    begin: ({ soft, sharp, overrides }, grant, signal) => {
      running.abort();
      if (sharp === undefined) return tell({ kind: 'none' });
      const mine = new AbortController();
      running = mine;
      const given = AbortSignal.any([mine.signal, signal]);
      const onProgress = (progress: Progress): void => {
        if (!given.aborted) tell({ kind: 'running', progress });
      };
      onProgress({ done: 0, text: 'Measuring the pair' });
      const work = { grant, signal: given, onProgress };
      assessor.assess({ soft, sharp }, overrides, work).then(
        (result) => {
          if (given.aborted || wasGivenUp(result)) return;
          if (result.ok) finish(result.value);
          else tell({ kind: 'failed', text: result.refusal.text });
        },
        (error: unknown) => {
          // Our own mistake: the reader must not wait for ever, and it must not pass unseen either.
          if (given.aborted) return;
          tell({ kind: 'failed', text: 'The measuring of the pair stopped with an error.' });
          throw error;
        },
      );
    },
    cancel: () => {
      running.abort();
      tell({ kind: 'failed', text: 'The measuring of the pair was given up.' });
    },
  };
}

/** Whether the measure says that the soft plate holds the sharper stack. */
export function isWrongOrder(
  { soft }: Pick<PairState, 'soft'>,
  { measuredSharpKey }: Pick<MeasuredPair, 'measuredSharpKey'>,
): boolean {
  return measuredSharpKey === soft.key;
}

/** The order was taken from the series numbers, which asks the reader to check; measured the same, it needs no checking. */
function isOrderConfirmed(
  { chosenBy, link, sharp }: PairState,
  { measuredSharpKey }: Pick<MeasuredPair, 'measuredSharpKey'>,
): boolean {
  return chosenBy === 'order' && link === 'position' && measuredSharpKey === sharp?.key;
}

/** Once the reader chose, or something is marked, nothing is swapped silently. */
function mayReorder({ chosenBy }: PairState, note: Note | undefined): boolean {
  return chosenBy === 'order' && (note?.regions.length ?? 0) === 0;
}
