import { success } from '../../../../core/result.js';
import type { AppState } from '../../../../renderer/state/appState.js';
import { createStore, type Store } from '../../../../renderer/state/store.js';
import type { ToolPointer, ToolPort } from '../../../../renderer/tools/tool.js';
import { toolAt } from '../../../../renderer/tools/toolAt.js';
import { createToolMachine, type ToolMachine } from '../../../../renderer/tools/toolMachine.js';
import { createToolPort } from '../../../../renderer/tools/toolPort.js';
import { createCuts } from '../../../../renderer/volumes/cuts.js';

export const NOW = '2026-01-10T10:42:00Z';
const NOTHING = { soft: null, sharp: null } as const;

/** Measures nothing, and takes every click for the middle of a vessel of 3 mm. */
export const EMPTY_BENCH: Parameters<typeof createToolPort>[1] = {
  measure: () => NOTHING,
  measureEdge: () => NOTHING,
  measureProfile: () => NOTHING,
  cuts: createCuts(() => undefined),
  fitting: {
    fitOf: () => undefined,
    refresh: () => {},
    propose: (centreMm) => success({ centreMm, radiusMm: 1.5 }),
  },
};

/** A store with the tools on it; regions are placed without being measured. */
export function toolsOn(state: AppState): {
  readonly store: Store;
  readonly port: ToolPort;
  readonly machine: ToolMachine;
} {
  const store = createStore(state);
  const port = createToolPort(store, EMPTY_BENCH, () => NOW);
  const machine = createToolMachine(port, (pointer) => toolAt(store.now(), pointer));
  return { store, port, machine };
}

/** A pointer on the soft plate. */
export function pointer(x: number, y: number, held: Partial<ToolPointer> = {}): ToolPointer {
  return { kernel: 'soft', point: { x, y }, shift: false, alt: false, ...held };
}
