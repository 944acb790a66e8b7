import { signal as createSignal, type ReadonlySignal } from '@preact/signals';
import type { FolderLevel, OpenFolder } from '../../app/host/contract.js';
import type { Result } from '../../core/result.js';
import type { HostClient } from '../host/client.js';
import type { AppState } from '../state/appState.js';
import type { Store } from '../state/store.js';

/** What the browser shell's folder dialog shows. */
export interface FolderDialogState {
  readonly level: FolderLevel | undefined;
  readonly problem: string | undefined;
}

/** The browser shell's way to choose a folder: a dialog over the folder names that the host lists. */
export interface FolderDialog {
  readonly state: ReadonlySignal<FolderDialogState>;
  /** Opens the dialog; resolves with the folder, or undefined when the reader closed it. */
  ask(): Promise<OpenFolder | undefined>;
  enter(levelId: string): void;
  choose(levelId: string): void;
  /** Opens a folder of the list of recent ones, from the dialog or without it. */
  openRecent(id: string): Promise<OpenFolder | undefined>;
  /** Takes a folder off the list, and deletes what was kept of its headers. */
  forget(id: string): void;
  forgetAll(): void;
  close(): void;
}

export function createFolderDialog(
  store: Store,
  client: Pick<HostClient, 'browse' | 'openFolder' | 'openRecent' | 'forgetOne' | 'forgetRecent'>,
  signal: AbortSignal,
): FolderDialog {
  const state = createSignal<FolderDialogState>({ level: undefined, problem: undefined });
  let answer: ((folder: OpenFolder | undefined) => void) | undefined;
  /** Only the level that was asked for last is shown. */
  let browsing = new AbortController();

  const enter = (levelId: string | undefined): void => {
    browsing.abort();
    browsing = new AbortController();
    const { signal: mine } = browsing;
    void client.browse(levelId, AbortSignal.any([mine, signal])).then((level) => {
      if (mine.aborted) return;
      state.value = level.ok
        ? { level: level.value, problem: undefined }
        : { ...state.peek(), problem: level.refusal.text };
    });
  };
  const finish = (folder: OpenFolder | undefined): void => {
    browsing.abort();
    store.change('Close dialog', (now) =>
      now.dialog === 'openFolder' ? { ...now, dialog: undefined } : now,
    );
    answer?.(folder);
    answer = undefined;
  };

  /** Names of patients may still lie on the disk when it failed: the reader must know. */
  const showLeft = (recent: Result<AppState['recent']>): void => {
    if (recent.ok) store.change('Forget folder', (now) => ({ ...now, recent: recent.value }));
    else state.value = { ...state.peek(), problem: recent.refusal.text };
  };

  return {
    state,
    ask: () => {
      answer?.(undefined);
      state.value = { level: undefined, problem: undefined };
      store.change('Open dialog', (now) => ({ ...now, dialog: 'openFolder' }));
      enter(undefined);
      return new Promise((resolve) => {
        answer = resolve;
      });
    },
    enter,
    choose: (levelId) => {
      void client.openFolder(levelId, signal).then((folder) => {
        if (folder.ok) finish(folder.value);
        else state.value = { ...state.peek(), problem: folder.refusal.text };
      });
    },
    openRecent: async (id) => {
      const folder = await client.openRecent(id, signal);
      if (folder.ok) {
        if (answer !== undefined) finish(undefined);
        return folder.value;
      }
      const { text } = folder.refusal;
      state.value = { ...state.peek(), problem: text };
      store.change('Warn', (now) => ({ ...now, message: { tone: 'warning', text } }));
      return undefined;
    },
    forget: (id) => {
      void client.forgetOne(id, signal).then(showLeft);
    },
    forgetAll: () => {
      void client.forgetRecent(signal).then(showLeft);
    },
    close: () => finish(undefined),
  };
}
