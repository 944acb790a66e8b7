import { add, gridNormal, type SliceGrid, scale } from '../geometry/index.js';
import type { StoredOf } from '../region/index.js';
import { type Result, refuse, success } from '../result.js';
import { isUnscaled, type Stack } from '../stack/index.js';
import { cutCubic } from './cutCubic.js';
import { cutLinear } from './cutLinear.js';
import { type CutPlane, emptyCut } from './cutPlane.js';
import { leanMm, planeInStack, slicesAcross } from './layers.js';
import type { Interpolation, Resampling } from './resampling.js';

/** How a stack is cut. */
export interface CutOptions {
  readonly interpolation?: Interpolation;
  /** Mean over this thickness across the plane, mm, the plane in its middle; a cut without thickness where nothing is said. */
  readonly slabMm?: number | undefined;
}

/** A stack cut by a plane. */
export interface StackCut {
  readonly stack: Stack;
  readonly grid: SliceGrid;
  /** HU, row after row. NaN where the plane has no value: outside, next to padding, in a gap, at a slice that can't be had. */
  readonly hu: Float32Array;
  readonly resampling: Resampling;
  /** The lowest and the highest slice that values rest on, as indices into the stack; undefined where there is no value. */
  readonly slices: { readonly first: number; readonly last: number } | undefined;
  /** Slices that were needed and could not be had: read them and cut again. Ascending. */
  readonly lacking: readonly number[];
}

/** Beyond this a slab is no thin one, and no vessel is seen in it, mm. */
export const THICKEST_SLAB_MM = 20;
/** The slices of a stack may lean against the first by this much at their corners, mm: cosines in files are rounded. */
const MOST_LEAN_MM = 0.05;

/**
 * Cuts a stack with a plane, exact in patient space: slices are taken at their true positions, uneven as they may be, each
 * with its own place of pixels (a sheared stack) and its own rescale, along the normal of the slices. What is not there is
 * not made up.
 *
 * A slab is the mean of planes at even distances of at most half of the finest spacing of the stack, each in the middle of
 * its share of the thickness; where one of them has no value the mean has none. In a sheared stack, as in any, the slab
 * runs along the plane's own normal.
 *
 * @returns refused where the values are no HU, where lengths are not known, and where slices lean against each other
 */
export function cutStack(
  stack: Stack,
  storedOf: StoredOf,
  grid: SliceGrid,
  { interpolation = 'linear', slabMm }: CutOptions = {},
): Result<StackCut> {
  if (slabMm !== undefined && !(slabMm > 0 && slabMm <= THICKEST_SLAB_MM))
    throw new RangeError(`invalid slab thickness: ${slabMm}`);
  const { grid: own } = stack.slices[0].image;
  if (isUnscaled(stack))
    return refuse('no-pixel-spacing', 'The files have no pixel spacing: no oblique cut.');
  if (stack.unit !== 'HU')
    return refuse(
      'not-hu',
      `The values of this stack are “${stack.unit}”, not HU: no oblique cut.`,
    );
  if (own.rows < 2 || own.columns < 2)
    return refuse('too-small', 'The slices are one pixel wide: no oblique cut.');
  if (stack.slices.some((slice) => leanMm(slice, own) > MOST_LEAN_MM))
    return refuse('slices-lean', 'The slices of this stack are not parallel: no oblique cut.');
  const stepMm = finestMm(stack) / 2;
  const planes = slabMm === undefined ? 1 : Math.ceil(slabMm / stepMm - 1e-9);
  const offsets = Array.from(
    { length: planes },
    (_, plane) => ((plane + 0.5) / planes - 0.5) * (slabMm ?? 0),
  );
  const cuts = cutAt(stack, storedOf, grid, interpolation);
  const cut = planes === 1 ? cuts(0) : meanOf(offsets.map((offset) => () => cuts(offset)));
  const first = cut.used.indexOf(1);
  return success({
    stack,
    grid,
    hu: cut.hu,
    resampling: { interpolation, slabMm: slabMm ?? null, planes },
    slices: first < 0 ? undefined : { first, last: cut.used.lastIndexOf(1) },
    lacking: [...cut.lacking.keys()].filter((index) => cut.lacking[index] === 1),
  });
}

/**
 * The slices that a cut may need, as indices into the stack, ascending: for reading them first where they are not in memory.
 */
export function slicesOfCut(
  stack: Stack,
  grid: SliceGrid,
  { slabMm = 0 }: CutOptions = {},
): readonly number[] {
  const [low, high] = [-slabMm / 2, slabMm / 2].map((offsetMm) =>
    slicesAcross(stack, movedBy(grid, offsetMm)),
  ) as [ReturnType<typeof slicesAcross>, ReturnType<typeof slicesAcross>];
  const from = Math.min(low.from, high.from);
  return Array.from({ length: Math.max(low.end, high.end) - from }, (_, index) => from + index);
}

/** The shortest of the distances between pixels, rows and slices. */
function finestMm({ slices, sliceSpacingMm }: Stack): number {
  return Math.min(...slices[0].image.grid.pixelSpacingMm, sliceSpacingMm ?? Infinity);
}

/** Cuts planes parallel to a grid, by their distance along its normal, mm. */
function cutAt(
  stack: Stack,
  storedOf: StoredOf,
  grid: SliceGrid,
  interpolation: Interpolation,
): (offsetMm: number) => CutPlane {
  const method = interpolation === 'linear' ? cutLinear : cutCubic;
  return (offsetMm) => {
    const moved = movedBy(grid, offsetMm);
    const cut = emptyCut(grid.rows * grid.columns, stack.slices.length);
    method(planeInStack(stack, storedOf, moved), grid.columns, grid.rows, cut);
    return cut;
  };
}

function movedBy(grid: SliceGrid, offsetMm: number): SliceGrid {
  return { ...grid, positionMm: add(grid.positionMm, scale(gridNormal(grid), offsetMm)) };
}

/** Mean of planes; NaN where one of them is. Made one after another: a slab may have a hundred of them. */
function meanOf(planes: readonly (() => CutPlane)[]): CutPlane {
  const [first, ...rest] = planes;
  if (first === undefined) throw new RangeError('no planes in a slab');
  const { hu, used, lacking } = first();
  const sum = Float64Array.from(hu);
  for (const plane of rest) {
    const next = plane();
    for (let index = 0; index < sum.length; index++)
      sum[index] = (sum[index] as number) + (next.hu[index] as number);
    for (let slice = 0; slice < used.length; slice++) {
      if (next.used[slice] === 1) used[slice] = 1;
      if (next.lacking[slice] === 1) lacking[slice] = 1;
    }
  }
  return { hu: Float32Array.from(sum, (total) => total / planes.length), used, lacking };
}
