import type { Kernel } from '../../core/note/index.js';
import type { AppState } from '../state/appState.js';
import type { PlateFace } from '../state/compareSelectors.js';
import type { StoredSlice } from '../volumes/volume.js';
import { createDifferenceContent } from './differenceContent.js';
import { type PlateContent, plateContent } from './plateContent.js';

/** One picture of a plate. A plate that folds or alternates has two, one over the other. */
export interface Layer {
  readonly name: Kernel | 'difference';
  /** The plates in the state that this layer lays out. */
  readonly kernels: readonly Kernel[];
  readonly contentOf: (state: AppState, devicePixelRatio: number) => PlateContent;
}

/** Stored values of a slice; undefined until it was read. */
export type Stored = (kernel: Kernel, index: number) => StoredSlice | undefined;

/** The pictures of a plate, the lowest first. */
export function layersOf(face: PlateFace, stored: Stored): readonly Layer[] {
  const kernelLayer = (kernel: Kernel): Layer => ({
    name: kernel,
    kernels: [kernel],
    contentOf: (state, ratio) =>
      plateContent(state, kernel, (index) => stored(kernel, index), ratio),
  });
  switch (face) {
    case 'difference':
      return [
        {
          name: 'difference',
          kernels: ['soft', 'sharp'],
          contentOf: createDifferenceContent(stored),
        },
      ];
    case 'fold':
    case 'alternate':
      return [kernelLayer('soft'), kernelLayer('sharp')];
    default:
      return [kernelLayer(face)];
  }
}
