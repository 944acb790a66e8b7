import { formatFixed } from '../../core/format/index.js';
import { orientationLetters, scaleBar } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import type { AppState } from '../state/appState.js';
import { kernelOfFace, type PlateFace } from '../state/compareSelectors.js';
import { otherKernel, plateScale, shownSlice, stackOf } from '../state/selectors.js';
import type { Store } from '../state/store.js';
import { type FoldedSlice, PlateLegend } from './PlateLegend.js';
import { positionText } from './positionText.js';

/** The scale bar takes at most this much of a plate's width, and this many CSS pixels. */
const BAR_SHARE = 0.22;
const BAR_PX = 140;

/** The words over a plate, from the state; none where there is no slice. */
export function PlateLabels({ face, store }: { readonly face: PlateFace; readonly store: Store }) {
  const state = store.state.value;
  const kernel = kernelOfFace(state, face);
  const stack = stackOf(state, kernel);
  const shown = shownSlice(state, kernel);
  if (stack === undefined || shown === undefined) return null;
  const { window, size } = state.plates[kernel];
  const scale = plateScale(state, kernel);
  const { image, alongMm } = shown.slice;
  return (
    <PlateLegend
      kernel={kernel}
      image={image}
      window={window}
      folded={face === 'fold' ? foldedSlice(state, otherKernel(kernel)) : undefined}
      difference={face === 'difference'}
      position={positionText(image.grid, alongMm)}
      oblique={cutText(state)}
      sliceIndex={shown.index}
      slices={stack.slices.length}
      letters={orientationLetters(image.grid)}
      bar={
        scale === undefined || image.grid.unscaled
          ? undefined
          : scaleBar(scale, Math.min(size.widthPx * BAR_SHARE, BAR_PX))
      }
    />
  );
}

/** What stands in place of the slice's position on an oblique cut; undefined on slices. */
export function cutText({ cut, note }: Pick<AppState, 'cut' | 'note'>): string | undefined {
  const plane = note?.planes.find(({ id }) => id === cut?.planeId);
  if (plane === undefined) return undefined;
  return `${plane.label} · ${formatFixed(plane.angleDeg, 0)}° to the slices · resampled`;
}

function foldedSlice(state: AppState, kernel: Kernel): FoldedSlice | undefined {
  const shown = shownSlice(state, kernel);
  if (shown === undefined) return undefined;
  return { kernel, image: shown.slice.image, window: state.plates[kernel].window };
}
