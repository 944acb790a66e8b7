import type { Bench } from '../services/bench.js';
import { placeRegion, reshapeRegion } from '../state/changes/regions.js';
import type { Store } from '../state/store.js';
import type { ToolPort } from './tool.js';

/** What tools can do, on the page's own store. */
export function createToolPort(
  store: Store,
  bench: Pick<Bench, 'measure'>,
  now: () => string,
): ToolPort {
  return {
    now: store.now,
    change: store.change,
    placeRegion: (role, shape) =>
      store.change('Place region', placeRegion(role, shape, bench.measure(shape), now())),
    reshapeRegion: (id, shape, key) =>
      store.change('Change region', reshapeRegion(id, shape, bench.measure(shape), now(), key)),
  };
}
