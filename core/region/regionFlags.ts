import type { Stack } from '../stack/index.js';
import { isUnscaled } from '../stack/index.js';
import { findSlice } from './findSlice.js';
import { FLAGS } from './flags.js';
import type { NearEdge } from './nearEdge.js';
import { edgesNear, type SliceToSearch, type StackBeside } from './nearEdgeSearch.js';
import type { EdgeKind } from './nearEdgeStructures.js';
import { reachesOver } from './reachesOver.js';
import type { Shape } from './shape.js';
import { smallestWidthMm } from './smallestWidth.js';
import type { Flag } from './value.js';

/**
 * With fewer pixels the SD is uncertain by more than a fifth even if no two of them shared their noise:
 * its relative error is 1/√(2(n − 1)), 21 % for 12 (Ahn & Fessler 2003, standard errors of mean, variance and SD).
 */
export const FEW_PIXELS = 12;
/** The slice may lie this part of its stack's spacing from the region before its tissue may be another. */
const MOST_OFFSET = 0.25;
/** Positions in files are rounded, mm. */
const ROUNDING_MM = 1e-6;

/**
 * What speaks against trusting a region's mean on one stack, by its size, its place and what lies beside it. Each
 * flag says what to do.
 *
 * @param offsetMm from the region's plane to the slice
 * @param medianHu of the region on this slice
 */
export function regionFlags(
  shape: Shape,
  stack: Stack,
  own: SliceToSearch,
  measured: { readonly n: number; readonly offsetMm: number; readonly medianHu: number },
  beside?: StackBeside,
): readonly Flag[] {
  const flags: Flag[] = [];
  if (measured.n > 1 && measured.n < FEW_PIXELS) flags.push(FLAGS.fewPixels(measured.n));
  const spacingMm = stack.sliceSpacingMm ?? own.slice.image.acquisition.thicknessMm;
  const offsetMm = Math.abs(measured.offsetMm);
  if (spacingMm !== undefined && offsetMm > MOST_OFFSET * spacingMm + ROUNDING_MM)
    flags.push(FLAGS.sliceApart(offsetMm, spacingMm));
  if (beside !== undefined && isBeyondField(shape, beside.stack)) flags.push(FLAGS.beyondShared);
  const found = edgesNear(shape, own, measured.medianHu, beside);
  const blurMm = 'code' in own.noise ? null : own.noise.blurFwhmMm;
  if (blurMm !== null && smallestWidthMm(shape, own.slice.image.grid) < 2 * blurMm)
    flags.push(FLAGS.belowTwoBlurs(blurMm));
  if (found === undefined) flags.push(FLAGS.edgesNotSought);
  else
    for (const { kind, distanceMm } of nearestOfKinds(found.edges))
      flags.push(FLAGS.nearEdge(kind, distanceMm, found.withinMm));
  return flags;
}

/** Whether a region lies, in part at least, where the other stack has no pixels or no slice. */
function isBeyondField(shape: Shape, other: Stack): boolean {
  if (isUnscaled(other)) return false;
  const found = findSlice(shape, other);
  if (!found.ok) return found.refusal.code === 'no-slice-here';
  const slice = other.slices[found.value.sliceIndex];
  return slice !== undefined && reachesOver(shape, slice);
}

/** The nearest edge of each kind, in the order of distance. */
function nearestOfKinds(edges: readonly NearEdge[]): readonly NearEdge[] {
  const seen = new Set<EdgeKind>();
  return edges.filter(({ kind }) => !seen.has(kind) && seen.add(kind));
}
