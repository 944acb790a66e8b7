import type { EdgeValues, RegionValues } from '../../../../core/note/index.js';
import type { AppState } from '../../../../renderer/state/appState.js';
import { placeEdge, reshapeEdge } from '../../../../renderer/state/changes/edges.js';
import { placeRegion, reshapeRegion } from '../../../../renderer/state/changes/regions.js';
import { createStore, type Store } from '../../../../renderer/state/store.js';
import type { ToolPointer, ToolPort } from '../../../../renderer/tools/tool.js';
import { toolAt } from '../../../../renderer/tools/toolAt.js';
import { createToolMachine, type ToolMachine } from '../../../../renderer/tools/toolMachine.js';

export const NOW = '2026-01-10T10:42:00Z';
const NOT_MEASURED: RegionValues = { soft: null, sharp: null };
const NOT_MEASURED_LINE: EdgeValues = { soft: null, sharp: null };

/** A store with the tools on it; regions are placed without being measured. */
export function toolsOn(state: AppState): {
  readonly store: Store;
  readonly port: ToolPort;
  readonly machine: ToolMachine;
} {
  const store = createStore(state);
  const port: ToolPort = {
    now: store.now,
    change: store.change,
    placeRegion: (role, shape) =>
      store.change('Place region', placeRegion(role, shape, NOT_MEASURED, NOW)),
    reshapeRegion: (id, shape, key) =>
      store.change('Change region', reshapeRegion(id, shape, NOT_MEASURED, NOW, key)),
    placeLine: (_, line) => store.change('Place line', placeEdge(line, NOT_MEASURED_LINE, NOW)),
    reshapeLine: (_, id, line, key) =>
      store.change('Change line', reshapeEdge(id, line, NOT_MEASURED_LINE, NOW, key)),
  };
  const machine = createToolMachine(port, (pointer) => toolAt(store.now(), pointer));
  return { store, port, machine };
}

/** A pointer on the soft plate. */
export function pointer(x: number, y: number, held: Partial<ToolPointer> = {}): ToolPointer {
  return { kernel: 'soft', point: { x, y }, shift: false, alt: false, ...held };
}
