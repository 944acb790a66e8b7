import { type ReadonlySignal, signal } from '@preact/signals';
import type { AppState } from './appState.js';
import { INITIAL_STATE } from './initialState.js';

/** A named change of the state: a pure function of the state before. */
export type Change = (state: AppState) => AppState;

/** The one store of the page. The state is plain data and is changed by named changes only. */
export interface Store {
  readonly state: ReadonlySignal<AppState>;
  /** The state now, without subscribing to it. */
  now(): AppState;
  /** Makes a change; `name` says what happened, for those who watch. */
  change(name: string, change: Change): void;
  /** Called after every change that changed something. Returns an unsubscribe function. */
  watch(watcher: (name: string, after: AppState, before: AppState) => void): () => void;
}

export function createStore(initial: AppState = INITIAL_STATE): Store {
  const state = signal(initial);
  const watchers = new Set<(name: string, after: AppState, before: AppState) => void>();
  return {
    state,
    now: () => state.peek(),
    change: (name, change) => {
      const before = state.peek();
      const after = change(before);
      if (after === before) return;
      state.value = after;
      for (const watcher of watchers) watcher(name, after, before);
    },
    watch: (watcher) => {
      watchers.add(watcher);
      return () => {
        watchers.delete(watcher);
      };
    },
  };
}
