import { useEffect, useState } from 'preact/hooks';
import type { NoteProfile } from '../../core/note/index.js';
import { stentSentence } from '../../core/report/stentSentence.js';
import { useEngine } from '../engine.js';
import { plateName } from '../plates/plateDescription.js';
import type { AppState } from '../state/appState.js';
import { selectedProfile } from '../state/lineSelectors.js';
import { isBlind, selectedRegion } from '../state/regionSelectors.js';
import { selectedStent } from '../state/stentSelectors.js';

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
  const stent = selectedStent(state);
  if (stent !== undefined) return `${plate}. ${stent.label}: ${stentSentence(stent)}`;
  const profile = selectedProfile(state);
  if (profile !== undefined) return `${plate}. ${profile.label}: ${spokenWidths(profile)}`;
  if (region === undefined) return plate;
  const mean = (hu: number | null | undefined): string =>
    hu === null || hu === undefined ? 'no value' : `${hu.toFixed(1)}`;
  return `${plate}. ${region.label}: mean soft ${mean(region.soft?.meanHu)}, sharp ${mean(region.sharp?.meanHu)} ${state.pair.soft.unit}`;
}

function spokenWidths({ soft, sharp }: NoteProfile): string {
  const width = (value: NoteProfile['soft']): string =>
    value?.visibleWidthMm == null ? 'none' : `${value.visibleWidthMm.toFixed(2)} mm`;
  return `visible width soft ${width(soft)}, sharp ${width(sharp)}`;
}
