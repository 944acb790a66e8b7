import { useEffect, useState } from 'preact/hooks';
import { useEngine } from '../engine.js';
import { plateName } from '../plates/plateDescription.js';
import type { AppState } from '../state/appState.js';
import { isBlind, selectedRegion } from '../state/regionSelectors.js';

/** Something is said only after this long without a further change, ms: scrolling is not read out slice by slice. */
const QUIET_MS = 600;

/** Says politely what has changed: the slice and window of the active plate, and the selected region's result. */
export function LiveRegion() {
  const { store } = useEngine();
  const [text, setText] = useState('');
  useEffect(() => {
    let timer: ReturnType<typeof setTimeout> | undefined;
    const stop = store.watch((_name, after, before) => {
      if (spoken(after) === spoken(before)) return;
      clearTimeout(timer);
      // What was said of the first reading must not stand there while it is read again.
      if (isBlind(after) && !isBlind(before)) setText('');
      timer = setTimeout(() => setText(spoken(store.now())), QUIET_MS);
    });
    return () => {
      clearTimeout(timer);
      stop();
    };
  }, [store]);
  return (
    <div class="visually-hidden" aria-live="polite">
      {text}
    </div>
  );
}

function spoken(state: AppState): string {
  if (state.pair === undefined) return '';
  const region = selectedRegion(state);
  const { way } = state.compare;
  const plate = plateName(state, way === 'open' ? state.active : way);
  if (region === undefined) return plate;
  const mean = (hu: number | null | undefined): string =>
    hu === null || hu === undefined ? 'no value' : `${hu.toFixed(1)}`;
  return `${plate}. ${region.label}: mean soft ${mean(region.soft?.meanHu)}, sharp ${mean(region.sharp?.meanHu)} ${state.pair.soft.unit}`;
}
