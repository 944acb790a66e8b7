import type { Kernel } from '../../core/note/index.js';
import type { AppState } from '../state/appState.js';
import { regionsOn } from '../state/regionSelectors.js';
import { shownSlice, stackOf } from '../state/selectors.js';

/** The name of a plate for those who don't see it: what it shows, which slice, which window. */
export function plateName(state: AppState, kernel: Kernel): string {
  const stack = stackOf(state, kernel);
  const name = kernel === 'soft' ? 'Soft plate' : 'Sharp plate';
  if (stack === undefined) return `${name}, empty`;
  const shown = shownSlice(state, kernel);
  if (shown === undefined) return `${name}, no slice here`;
  const { centre, width } = state.plates[kernel].window;
  const mm = shown.slice.alongMm.toFixed(1);
  return `${name}, slice ${shown.index + 1} of ${stack.slices.length}, ${mm} mm, window ${Math.round(centre)} ${Math.round(width)}`;
}

/** What can be done on a plate, and which regions lie on it. */
export function plateDescription(state: AppState, kernel: Kernel): string {
  const labels = regionsOn(state, kernel).map(({ label }) => label);
  const regions =
    labels.length === 0 ? 'No regions on this slice.' : `Regions: ${labels.join(', ')}.`;
  return `${regions} Arrows move the crosshair or the selected region, with Shift ten pixels. Page up and page down change the slice. Enter places a region with the chosen tool, plus and minus change its size, Escape gives up.`;
}
