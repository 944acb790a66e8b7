import { areAligned, finerSlice, latticeMap } from '../../core/compare/index.js';
import type { Kernel } from '../../core/note/index.js';
import type { AppState, CompareWay } from './appState.js';
import { otherKernel, shownSlice } from './selectors.js';

/** What a plate shows: one kernel, or both in one of the ways to compare. */
export type PlateFace = Kernel | Exclude<CompareWay, 'open'>;

/** Why a way to compare can't be used with this pair; undefined when it can. */
export function compareProblem({ pair }: AppState, way: CompareWay): string | undefined {
  if (way === 'open') return undefined;
  if (pair?.sharp === undefined) return 'One stack alone is read: there is nothing to compare.';
  const [soft, sharp] = [pair.soft.slices[0].image.grid, pair.sharp.slices[0].image.grid];
  if (!areAligned(soft, sharp)) {
    return 'These two stacks are turned against each other, so that they can only be shown side by side.';
  }
  if (way !== 'difference') return undefined;
  if (pair.link === 'index') {
    return 'Positions of these two stacks can’t be compared, so there is no difference to show.';
  }
  return pair.soft.unit === 'HU' && pair.sharp.unit === 'HU'
    ? undefined
    : 'A difference needs HU in both stacks.';
}

/** The kernel that Alternate shows now. */
export function alternateKernel({ compare }: AppState): Kernel {
  return compare.held ? otherKernel(compare.resting) : compare.resting;
}

/** The kernel on whose slice the difference lies: the one of the finer pixels. */
export function differenceKernel({ pair }: AppState): Kernel {
  if (pair?.sharp === undefined) return 'soft';
  return finerSlice(pair.soft.slices[0].image.grid, pair.sharp.slices[0].image.grid);
}

/** Whether the difference that is shown needs values between the coarser slice's pixels. */
export function isInterpolated(state: AppState): boolean {
  const [soft, sharp] = [shownSlice(state, 'soft'), shownSlice(state, 'sharp')];
  if (soft === undefined || sharp === undefined) return false;
  const map = latticeMap(soft.slice.image.grid, sharp.slice.image.grid);
  return map === undefined || !Object.values(map).every(Number.isInteger) || map.columnStep !== 1;
}

/** The kernel whose marks and view stand for a whole plate: shapes are drawn once, on its transform. */
export function kernelOfFace(state: AppState, face: PlateFace): Kernel {
  switch (face) {
    case 'alternate':
      return alternateKernel(state);
    case 'difference':
      return differenceKernel(state);
    case 'fold':
      return shownSlice(state, 'soft') === undefined ? 'sharp' : 'soft';
    default:
      return face;
  }
}

/** The kernel under a place of a plate, CSS pixels from its left edge. */
export function kernelAt(state: AppState, face: PlateFace, xPx: number): Kernel {
  if (face !== 'fold') return kernelOfFace(state, face);
  return xPx < state.compare.foldAt * state.plates.soft.size.widthPx ? 'soft' : 'sharp';
}
