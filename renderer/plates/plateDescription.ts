import type { VoiWindow } from '../../core/dicom/index.js';
import { visibleText } from '../../core/format/index.js';
import type { AppState } from '../state/appState.js';
import { kernelOfFace, type PlateFace } from '../state/compareSelectors.js';
import { regionsOn } from '../state/regionSelectors.js';
import { shownSlice, stackOf } from '../state/selectors.js';
import { cutText } from './PlateLabels.js';

const FACE_NAMES: Readonly<Record<PlateFace, string>> = {
  soft: 'Soft plate',
  sharp: 'Sharp plate',
  fold: 'Folded plate, soft on the left, sharp on the right',
  alternate: 'Alternating plate',
  difference: 'Difference plate, sharp minus soft',
};

/** The name of a plate for those who don't see it: what it shows, which slice, which window. */
export function plateName(state: AppState, face: PlateFace): string {
  const kernel = kernelOfFace(state, face);
  const stack = stackOf(state, kernel);
  const name = face === 'alternate' ? `${FACE_NAMES[face]}, now ${kernel}` : FACE_NAMES[face];
  if (stack === undefined) return `${name}, empty`;
  const shown = shownSlice(state, kernel);
  if (shown === undefined) return `${name}, no slice here`;
  const { window } = state.plates[kernel];
  const mm = shown.slice.alongMm.toFixed(1);
  const scale =
    face === 'difference'
      ? `scale plus and minus ${state.compare.rangeHu} HU`
      : `window ${spokenWindow(window)}`;
  const cut = cutText(state);
  if (cut !== undefined) return `${name}, oblique cut, ${cut}, ${scale}`;
  return `${name}, slice ${shown.index + 1} of ${stack.slices.length}, ${mm} mm, ${scale}`;
}

function spokenWindow({ centre, width, table, explanation }: VoiWindow): string {
  return table === undefined
    ? `${Math.round(centre)} ${Math.round(width)}`
    : `lookup table ${visibleText(explanation ?? 'without name')}`;
}

const FACE_KEYS: Partial<Readonly<Record<PlateFace, string>>> = {
  fold: ' The edge between soft and sharp is the next stop of Tab; arrows move it.',
  alternate: ' Space held shows the other kernel.',
  difference: ' Colours are for looking; nothing is measured on them.',
};

/** What can be done on a plate, and which regions lie on it. */
export function plateDescription(state: AppState, face: PlateFace): string {
  const labels = regionsOn(state, kernelOfFace(state, face)).map(({ label }) => label);
  const regions =
    labels.length === 0 ? 'No regions on this slice.' : `Regions: ${labels.join(', ')}.`;
  return `${regions} Arrows move the crosshair or the selected region, with Shift ten pixels. Page up and page down change the slice. Enter places a region with the chosen tool, plus and minus change its size, Escape gives up.${FACE_KEYS[face] ?? ''}`;
}
