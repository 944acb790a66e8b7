import { useComputed } from '@preact/signals';
import { useEngine } from '../engine.js';
import type { AppState } from '../state/appState.js';

/** A part of the state; the view is drawn again only when that part is another one. */
export function useSelected<T>(select: (state: AppState) => T): T {
  const { store } = useEngine();
  return useComputed(() => select(store.state.value)).value;
}
