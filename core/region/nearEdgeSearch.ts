import type { StoredValues } from '../dicom/index.js';
import type { Stack, StackSlice } from '../stack/index.js';
import { isUnscaled } from '../stack/index.js';
import { findSlice } from './findSlice.js';
import { regionValues, type StoredOf } from './measureRegion.js';
import { type NearEdge, nearEdges } from './nearEdge.js';
import { edgeLevels } from './nearEdgeLevels.js';
import { shapeCentre } from './plane.js';
import { reachesOver } from './reachesOver.js';
import type { Shape } from './shape.js';
import type { NoiseOfStack } from './standardError.js';
import { statistics } from './statistics.js';

/** The other stack of a pair, in the same space. */
export interface StackBeside {
  readonly stack: Stack;
  readonly storedOf: StoredOf;
  readonly noise: NoiseOfStack;
}

/** One slice to look for edges on. */
export interface SliceToSearch {
  readonly slice: StackSlice;
  readonly stored: StoredValues;
  readonly noise: NoiseOfStack;
}

/** What was found, and on which slice: its pixels are that slice's. */
export interface FoundEdges {
  readonly slice: StackSlice;
  /** Blur of the kernel that the region is measured on: so far counts as near. */
  readonly withinMm: number;
  readonly edges: readonly NearEdge[];
}

/**
 * Strong edges within a blur of a region that is measured on one slice. They are looked for on the other stack where
 * that is the sharper and has a slice here: a strut that a soft kernel blurs into the lumen shows there, at the same
 * place. How far is near is the blur of the kernel measured on, all the same.
 *
 * @param regionHu median of the region on its own slice
 * @returns undefined where the blur or the level of the lumen is not known: nothing is guessed then
 */
export function edgesNear(
  shape: Shape,
  own: SliceToSearch,
  regionHu: number,
  beside?: StackBeside,
): FoundEdges | undefined {
  const withinMm = blurOf(own.noise);
  if (withinMm === undefined) return undefined;
  const otherBlurMm = beside && blurOf(beside.noise);
  const other =
    beside !== undefined && otherBlurMm !== undefined && otherBlurMm < withinMm
      ? sliceBeside(shape, beside)
      : undefined;
  const { slice, stored, noise } = other ?? own;
  const [downMm, acrossMm] = slice.image.grid.pixelSpacingMm;
  const levels =
    'code' in noise ? undefined : edgeLevels(noise, shapeCentre(shape), [acrossMm, downMm]);
  if (levels === undefined) return undefined;
  return { slice, withinMm, edges: nearEdges(shape, slice, stored, levels, withinMm, regionHu) };
}

/** The same for a stack: on the slice that the region is measured on there, with its median. */
export function edgesNearOn(
  shape: Shape,
  { stack, storedOf, noise }: StackBeside,
  beside?: StackBeside,
): FoundEdges | undefined {
  const found = findSlice(shape, stack);
  if (!found.ok || stack.unit !== 'HU' || isUnscaled(stack)) return undefined;
  const slice = stack.slices[found.value.sliceIndex];
  const stored = storedOf(found.value.sliceIndex);
  if (slice === undefined || stored === undefined) return undefined;
  const { median } = statistics(regionValues(shape, slice, stored).values);
  return median === undefined
    ? undefined
    : edgesNear(shape, { slice, stored, noise }, median, beside);
}

function blurOf(noise: NoiseOfStack): number | undefined {
  return ('code' in noise ? null : noise.blurFwhmMm) ?? undefined;
}

/** The other stack's slice at a region, where it can be had and holds all of the region. */
function sliceBeside(shape: Shape, beside: StackBeside): SliceToSearch | undefined {
  if (beside.stack.unit !== 'HU' || isUnscaled(beside.stack)) return undefined;
  const found = findSlice(shape, beside.stack);
  if (!found.ok) return undefined;
  const slice = beside.stack.slices[found.value.sliceIndex];
  const stored = beside.storedOf(found.value.sliceIndex);
  if (slice === undefined || stored === undefined) return undefined;
  return reachesOver(shape, slice) ? undefined : { slice, stored, noise: beside.noise };
}
