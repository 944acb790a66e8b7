import type { Bench } from '../services/bench.js';
import { placeEdge, reshapeEdge } from '../state/changes/edges.js';
import { placeRegion, reshapeRegion } from '../state/changes/regions.js';
import type { Store } from '../state/store.js';
import type { ToolPort } from './tool.js';

/** What tools can do, on the page's own store. */
export function createToolPort(
  store: Store,
  bench: Pick<Bench, 'measure' | 'measureEdge'>,
  now: () => string,
): ToolPort {
  return {
    now: store.now,
    change: store.change,
    placeRegion: (role, shape) =>
      store.change('Place region', placeRegion(role, shape, bench.measure(shape), now())),
    reshapeRegion: (id, shape, key) =>
      store.change('Change region', reshapeRegion(id, shape, bench.measure(shape), now(), key)),
    placeLine: (_, line) =>
      store.change('Place line', placeEdge(line, bench.measureEdge(line), now())),
    reshapeLine: (_, id, line, key) =>
      store.change('Change line', reshapeEdge(id, line, bench.measureEdge(line), now(), key)),
  };
}
