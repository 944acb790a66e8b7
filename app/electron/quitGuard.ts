import type { MessageBoxOptions } from 'electron';
import { nextQuit, OPEN, type QuitEvent, type QuitStep } from './quitState.js';
import { type Decision, decisionOf, NOT_SAVED_QUESTION, UNSAVED_QUESTION } from './unsaved.js';

/** What the guard needs of the shell. */
export interface GuardedShell {
  hasUnsaved(): boolean;
  /** Has the page save; false when it did not manage. */
  save(): Promise<boolean>;
  /** Shows the question as a sheet and answers with the number of the button. */
  ask(question: MessageBoxOptions): Promise<number>;
  closeWindow(): void;
  reloadPage(): void;
  quitApp(): void;
  /** Told of a mistake of our own while asking; the window then stays open. */
  report(error: unknown): void;
}

/** The guard over unsaved changes; each member is called from the event of its name. */
export interface QuitGuard {
  beforeQuit(): void;
  /** True when the window must stay open for now. */
  close(): boolean;
  /**
   * The page's own beforeunload objects. True when it is to be overruled because the reader has
   * decided; else the reader is asked, and a reload is repeated after the answer.
   */
  unload(): boolean;
  /** The system shuts down: no dialog can be answered any more, so the page is told to save. */
  sessionEnd(): Promise<boolean>;
}

/**
 * Guards closing, quitting and reloading. Electron's events must be answered at once, while asking
 * takes time: so the attempt is held first, and repeated when the reader has decided.
 */
export function quitGuard(shell: GuardedShell): QuitGuard {
  let state = OPEN;
  /** The page is being reloaded with the reader's consent. */
  let reloading = false;
  /** The window is on its way to close, so an objection of the page is about that. */
  let closing = false;

  function advance(event: QuitEvent): QuitStep {
    const next = nextQuit(state, event);
    state = next.state;
    return next.step;
  }

  /** True when the reader's decision was carried out, false when it was Cancel. */
  async function settleUnsaved(): Promise<boolean> {
    let decision: Decision = decisionOf(await shell.ask(UNSAVED_QUESTION));
    while (decision === 'save') {
      if (await shell.save()) return true;
      decision = decisionOf(await shell.ask(NOT_SAVED_QUESTION));
    }
    return decision === 'discard';
  }

  function start(work: Promise<void>): void {
    work.catch((error: unknown) => {
      advance('cancelled');
      shell.report(error);
    });
  }

  async function askThenClose(): Promise<void> {
    const step = advance((await settleUnsaved()) ? 'settled' : 'cancelled');
    if (step === 'quit-app') shell.quitApp();
    if (step === 'close-window') shell.closeWindow();
  }

  async function askThenReload(): Promise<void> {
    const settled = await settleUnsaved();
    advance('cancelled');
    if (!settled) return;
    reloading = true;
    shell.reloadPage();
  }

  return {
    beforeQuit: () => {
      advance('quit-requested');
    },
    close: () => {
      const step = advance(shell.hasUnsaved() ? 'close-attempted-unsaved' : 'close-attempted');
      closing = step === 'let-close';
      if (step === 'hold-and-ask') start(askThenClose());
      return step !== 'let-close';
    },
    unload: () => {
      if (state.mayClose) return true;
      if (reloading) {
        reloading = false;
        return true;
      }
      const ask = closing ? askThenClose : askThenReload;
      closing = false;
      if (advance('close-attempted-unsaved') === 'hold-and-ask') start(ask());
      return false;
    },
    sessionEnd: () => {
      advance('session-ending');
      return shell.save();
    },
  };
}
