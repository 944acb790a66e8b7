import type { Progress } from '../../app/host/contract.js';
import { isUnsaved } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import type { Autosave } from './autosave.js';

/** The long work of the host, one at a time. */
export interface Jobs {
  /**
   * Begins work in place of any that is running. Undefined when a note could not be saved: what comes would put
   * another one in its place.
   */
  begin(text: string): Promise<AbortSignal | undefined>;
  /** Tells how far the work is, as long as it is the one that runs. */
  progress(running: AbortSignal): (progress: Progress) => void;
  end(): void;
  /** Gives up the work that is running. */
  cancel(): void;
}

export function createJobs(
  store: Store,
  autosave: Pick<Autosave, 'settled'>,
  signal: AbortSignal,
): Jobs {
  let job = new AbortController();
  const end = (): void => store.change('End work', (state) => ({ ...state, job: undefined }));
  return {
    begin: async (text) => {
      await autosave.settled();
      const { save } = store.now();
      if (isUnsaved(store.now()) && save.kind === 'failed') {
        const warning = `${save.text} Save it first, or export it as JSON.`;
        store.change('Warn', (state) => ({
          ...state,
          message: { tone: 'warning', text: warning },
        }));
        return undefined;
      }
      job.abort();
      job = new AbortController();
      store.change('Begin work', (state) => ({ ...state, job: { done: 0, text } }));
      return AbortSignal.any([job.signal, signal]);
    },
    progress: (running) => (progress) => {
      if (running.aborted) return;
      store.change('Progress', (state) => ({ ...state, job: progress }));
    },
    end,
    cancel: () => {
      job.abort();
      end();
    },
  };
}
