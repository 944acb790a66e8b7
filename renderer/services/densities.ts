import { measuredDensities, withDensities } from '../../core/note/index.js';
import type { AppState } from '../state/appState.js';
import { noiseOfKernel } from '../state/noiseOfKernel.js';
import type { Store } from '../state/store.js';
import type { Bench } from './bench.js';

/**
 * Keeps the density bands of the note's plaque regions with what they rest on: the regions, the pixels that have come,
 * the noise, and the table that is chosen. Ends with the signal.
 */
export function keepDensities(
  store: Store,
  bench: Pick<Bench, 'stored'>,
  now: () => string,
  signal: AbortSignal,
): void {
  let isWaiting = false;
  const measure = (): void => {
    isWaiting = false;
    const { note, pair } = store.now();
    if (signal.aborted || note === undefined || pair === undefined) return;
    if (note.verification === 'VERIFIED') return;
    const densities = measuredDensities(note, {
      soft: pair.soft,
      storedOf: (index) => bench.stored('soft', index),
      noise: noiseOfKernel(store.now(), 'soft'),
    });
    const measured = withDensities(note, densities, now());
    if (measured !== note)
      store.change('Measure density', (state) => ({ ...state, note: measured }));
  };
  const stop = store.watch((_name, after, before) => {
    if (isWaiting || !hasPlaque(after) || restsOnTheSame(after, before)) return;
    isWaiting = true;
    queueMicrotask(measure);
  });
  signal.addEventListener('abort', stop, { once: true });
}

function hasPlaque({ note }: AppState): boolean {
  if (note === undefined) return false;
  return note.densities.length > 0 || note.regions.some(({ role }) => role === 'plaque');
}

function restsOnTheSame(after: AppState, before: AppState): boolean {
  return (
    after.note?.regions === before.note?.regions &&
    after.note?.contrasts === before.note?.contrasts &&
    after.note?.bandTable === before.note?.bandTable &&
    after.note?.conditions === before.note?.conditions &&
    after.loading === before.loading &&
    after.assessment === before.assessment
  );
}
