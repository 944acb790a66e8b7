import type { SliceGrid } from '../../core/geometry/index.js';
import type { Kernel } from '../../core/note/index.js';
import type { Stack, StackSlice } from '../../core/stack/index.js';
import { nearestSlice, sliceIndexAt } from '../link/slicePosition.js';
import { fitScale, type PlateTransform, plateTransform } from '../plates/plateTransform.js';
import type { AppState } from './appState.js';

export const KERNELS = ['soft', 'sharp'] as const satisfies readonly Kernel[];

export function otherKernel(kernel: Kernel): Kernel {
  return kernel === 'soft' ? 'sharp' : 'soft';
}

/** What moves together. One plate that shows both kernels shows the same place of both, whatever is linked otherwise. */
export function linksOf({ links, compare }: AppState): AppState['links'] {
  return compare.way === 'open' ? links : { ...links, scroll: true, view: true };
}

/** The stack on a plate: one of the pair, or its oblique cut; undefined on an empty plate. */
export function stackOf(
  { pair, cut }: Pick<AppState, 'pair' | 'cut'>,
  kernel: Kernel,
): Stack | undefined {
  return (cut ?? pair)?.[kernel];
}

/** A slice of a stack with its index. */
export interface ShownSlice {
  readonly index: number;
  readonly slice: StackSlice;
}

/** The slice that a plate shows; undefined where its stack has no slice at the plate's position. */
export function shownSlice(state: AppState, kernel: Kernel): ShownSlice | undefined {
  const stack = stackOf(state, kernel);
  if (stack === undefined) return undefined;
  const index = sliceIndexAt(stack, state.plates[kernel].alongMm);
  const slice = index === undefined ? undefined : stack.slices[index];
  return index === undefined || slice === undefined ? undefined : { index, slice };
}

/**
 * The pixel grid that a plate works on: that of the shown slice, or where there is none that of the nearest
 * one, so that a plate beyond its stack keeps its scale.
 */
export function plateGrid(state: AppState, kernel: Kernel): SliceGrid | undefined {
  const stack = stackOf(state, kernel);
  if (stack === undefined) return undefined;
  const index = nearestSlice(stack.slices, state.plates[kernel].alongMm);
  return stack.slices[index]?.image.grid;
}

/**
 * CSS pixels per mm of a plate. 'fit' shows the whole slice; linked plates that both fit take the smaller of
 * the two scales, so that a millimetre is as long on one as on the other.
 */
export function plateScale(state: AppState, kernel: Kernel): number | undefined {
  const plate = state.plates[kernel];
  if (plate.scalePxPerMm !== 'fit') return plate.scalePxPerMm;
  const kernels = linksOf(state).view ? KERNELS : [kernel];
  const scales = kernels.flatMap((each) => {
    const grid = plateGrid(state, each);
    const scale = grid === undefined ? undefined : fitScale(grid, state.plates[each].size);
    return scale === undefined ? [] : [scale];
  });
  return scales.length === 0 ? undefined : Math.min(...scales);
}

/** How the slice lies on the plate; undefined while there is no stack or no layout. */
export function transformOf(state: AppState, kernel: Kernel): PlateTransform | undefined {
  const grid = plateGrid(state, kernel);
  const scale = plateScale(state, kernel);
  if (grid === undefined || scale === undefined) return undefined;
  const { size, centreMm } = state.plates[kernel];
  return plateTransform(grid, size, centreMm, scale);
}

/** Whether the note holds changes that the host doesn't have yet. */
export function isUnsaved(state: AppState): boolean {
  return (
    state.save.kind === 'saving' || state.save.kind === 'failed' || state.save.kind === 'conflict'
  );
}
