/** Where closing stands. Three flags, each with one meaning, instead of one that has several. */
export interface QuitState {
  /** The whole app was asked to quit, not only its window. */
  readonly quitRequested: boolean;
  /** The dialog is open, or its answer is being carried out: a second attempt must wait. */
  readonly asking: boolean;
  /** Nothing holds the window any more: the note is saved, or given up by the reader. */
  readonly mayClose: boolean;
}

/** What happened. */
export type QuitEvent =
  | 'quit-requested'
  | 'close-attempted'
  | 'close-attempted-unsaved'
  | 'cancelled'
  | 'settled'
  | 'session-ending';

/** What has to be done about it. */
export type QuitStep = 'none' | 'let-close' | 'hold' | 'hold-and-ask' | 'close-window' | 'quit-app';

export const OPEN: QuitState = { quitRequested: false, asking: false, mayClose: false };

/**
 * The next state and what to do.
 *
 * A close attempt with unsaved changes is held and asked about once. 'settled' (saved, or not to be
 * saved) closes what was meant to be closed; 'cancelled' forgets that it was meant.
 */
export function nextQuit(
  state: QuitState,
  event: QuitEvent,
): { readonly state: QuitState; readonly step: QuitStep } {
  switch (event) {
    case 'quit-requested':
      return { state: { ...state, quitRequested: true }, step: 'none' };
    case 'close-attempted':
    case 'close-attempted-unsaved': {
      if (state.mayClose) return { state, step: 'let-close' };
      if (state.asking) return { state, step: 'hold' };
      // Nothing is settled by it: the page may still object, and is then asked about.
      if (event === 'close-attempted') return { state, step: 'let-close' };
      return { state: { ...state, asking: true }, step: 'hold-and-ask' };
    }
    case 'cancelled':
      return { state: OPEN, step: 'none' };
    case 'settled':
      return {
        state: { ...state, asking: false, mayClose: true },
        step: state.quitRequested ? 'quit-app' : 'close-window',
      };
    case 'session-ending':
      return { state: { quitRequested: true, asking: false, mayClose: true }, step: 'none' };
  }
}
