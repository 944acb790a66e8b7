import type { Kernel } from '../../core/note/index.js';
import type { Stack, StackSlice } from '../../core/stack/index.js';
import type { AppState } from '../state/appState.js';
import { shownSlice, stackOf, transformOf } from '../state/selectors.js';
import type { StoredSlice } from '../volumes/volume.js';
import type { ViewportContent } from './cornerstoneViewport.js';
import { isSamePicture } from './picture.js';

/** What a plate has to show: a slice, or words that say why there is none. */
export type PlateContent =
  | { readonly kind: 'slice'; readonly content: ViewportContent }
  | { readonly kind: 'words'; readonly text: string };

/** Puts together what a plate shows from the state and the slice's stored values. */
export function plateContent(
  state: AppState,
  kernel: Kernel,
  stored: (index: number) => StoredSlice | undefined,
  devicePixelRatio: number,
): PlateContent {
  const stack = stackOf(state, kernel);
  if (stack === undefined) return { kind: 'words', text: '' };
  const shown = shownSlice(state, kernel);
  if (shown === undefined) {
    return { kind: 'words', text: 'No slice here. This stack has none at this position.' };
  }
  const gap = state.cut === undefined ? state.loading[kernel].gaps.get(shown.index) : undefined;
  if (gap !== undefined) return { kind: 'words', text: `No data for this slice. ${gap}` };
  const values = stored(shown.index);
  if (values === undefined) return { kind: 'words', text: 'Reading this slice…' };
  const transform = transformOf(state, kernel);
  if (transform === undefined) return { kind: 'words', text: '' };
  return {
    kind: 'slice',
    content: {
      id: contentId(stack, shown.slice),
      picture: {
        kind: 'greys',
        stored: values,
        pixels: shown.slice.image.pixels,
        window: state.plates[kernel].window,
      },
      transform,
      smooth: state.smooth,
      devicePixelRatio,
    },
  };
}

/** Names the pixels: an image of a file by its UID and frame, an oblique cut by its stack and place. */
function contentId({ key }: Stack, { image }: StackSlice): string {
  const { sopInstanceUid, frame, grid } = image;
  if (sopInstanceUid !== '') return `${sopInstanceUid}#${frame ?? ''}`;
  return `${key} ${JSON.stringify([grid.positionMm, grid.rowDirection, grid.columnDirection])}`;
}

/** True when both would give the same picture. */
export function isSameContent(a: PlateContent, b: PlateContent): boolean {
  if (a.kind === 'words' || b.kind === 'words') return a.kind === b.kind;
  const [x, y] = [a.content, b.content];
  return (
    isSamePicture(x.picture, y.picture) &&
    x.smooth === y.smooth &&
    x.devicePixelRatio === y.devicePixelRatio &&
    x.transform.grid === y.transform.grid &&
    x.transform.size === y.transform.size &&
    x.transform.pxPerColumn === y.transform.pxPerColumn &&
    x.transform.pxPerRow === y.transform.pxPerRow &&
    x.transform.centre.column === y.transform.centre.column &&
    x.transform.centre.row === y.transform.centre.row
  );
}
