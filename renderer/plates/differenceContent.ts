import { type ComparedSlice, sliceDifference } from '../../core/compare/index.js';
import type { AppState } from '../state/appState.js';
import { differenceKernel } from '../state/compareSelectors.js';
import { transformOf } from '../state/selectors.js';
import type { Layer, Stored } from './layers.js';
import { type PlateContent, plateContent } from './plateContent.js';

/**
 * Puts together the difference of the two slices that are shown. The last one is remembered: zooming and changing the
 * scale compute nothing anew.
 */
export function createDifferenceContent(stored: Stored): Layer['contentOf'] {
  let last: { soft: ComparedSlice; sharp: ComparedSlice; hu: Float32Array | undefined } | undefined;

  const differenceHu = (soft: ComparedSlice, sharp: ComparedSlice): Float32Array | undefined => {
    if (last === undefined || !isSame(last.soft, soft) || !isSame(last.sharp, sharp)) {
      last = { soft, sharp, hu: sliceDifference(soft, sharp)?.hu };
    }
    return last.hu;
  };

  return (state: AppState, devicePixelRatio: number): PlateContent => {
    const on = (kernel: 'soft' | 'sharp'): PlateContent =>
      plateContent(state, kernel, (index) => stored(kernel, index), devicePixelRatio);
    const [soft, sharp] = [on('soft'), on('sharp')];
    if (soft.kind === 'words') return { kind: 'words', text: words('Soft', soft.text) };
    if (sharp.kind === 'words') return { kind: 'words', text: words('Sharp', sharp.text) };
    const [a, b] = [comparedOf(soft), comparedOf(sharp)];
    const transform = transformOf(state, differenceKernel(state));
    const hu = a && b && differenceHu(a, b);
    if (hu === undefined || transform === undefined) {
      return { kind: 'words', text: 'These slices can’t be subtracted.' };
    }
    return {
      kind: 'slice',
      content: {
        id: `${sharp.content.id} − ${soft.content.id}`,
        picture: { kind: 'difference', hu, rangeHu: state.compare.rangeHu },
        transform,
        smooth: state.smooth,
        devicePixelRatio,
      },
    };
  };
}

function words(name: string, text: string): string {
  return text === '' ? '' : `${name}: ${text}`;
}

function comparedOf(from: PlateContent): ComparedSlice | undefined {
  if (from.kind === 'words' || from.content.picture.kind !== 'greys') return undefined;
  const { picture, transform } = from.content;
  return { grid: transform.grid, pixels: picture.pixels, stored: picture.stored };
}

function isSame(a: ComparedSlice, b: ComparedSlice): boolean {
  return a.stored === b.stored && a.grid === b.grid && a.pixels === b.pixels;
}
