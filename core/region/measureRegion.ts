import type { StoredValues } from '../dicom/index.js';
import { isPadding, LOWEST_IMAGE_HU, rescaled } from '../intensity/index.js';
import { isUnscaled, type Stack, type StackSlice } from '../stack/index.js';
import { shapeArea } from './area.js';
import { findSlice } from './findSlice.js';
import { FLAGS } from './flags.js';
import type { StackBeside } from './nearEdgeSearch.js';
import { visitRuns } from './pixelsInside.js';
import { placementSensitivity } from './placement.js';
import { regionFlags } from './regionFlags.js';
import type { Shape } from './shape.js';
import { type NoiseOfStack, regionStandardError } from './standardError.js';
import { statistics } from './statistics.js';
import type { Flag, RegionValue } from './value.js';

/** Stored values of a slice of the stack; undefined when it can't be had. */
export type StoredOf = (sliceIndex: number) => StoredValues | undefined;

/**
 * Measures a shape on one stack: on the nearest slice, over the pixels whose centres lie inside it, padding left
 * out, nothing resampled. What can't be had is null, and a flag says why.
 *
 * @param texture the noise of the stack's kernel, for the standard error of the mean; or why it is not known
 * @param beside the other stack of the pair, in the same space: strong edges show best on the sharper
 */
export function measureRegion(
  shape: Shape,
  stack: Stack,
  storedOf: StoredOf,
  texture: NoiseOfStack = FLAGS.noStandardError,
  beside?: StackBeside,
): RegionValue {
  if (isUnscaled(stack)) return withoutValue(shape, null, null, null, [FLAGS.noPixelSpacing]);
  const found = findSlice(shape, stack);
  if (!found.ok) return withoutValue(shape, null, null, null, [found.refusal]);
  const { sliceIndex, offsetMm } = found.value;
  const slice = stack.slices[sliceIndex];
  const stored = storedOf(sliceIndex);
  if (slice === undefined || stored === undefined) {
    return withoutValue(shape, sliceIndex, offsetMm, slice ?? null, [FLAGS.sliceMissing]);
  }
  if (stack.unit !== 'HU') {
    return withoutValue(shape, sliceIndex, offsetMm, slice, [FLAGS.notHu(stack.unit)]);
  }
  const where = { stack, sliceIndex, offsetMm, texture, beside };
  return measureOnSlice(shape, slice, stored, where);
}

/** HU of the pixels in a shape on one slice, padding left out, with what was left out. */
export function regionValues(
  shape: Shape,
  slice: StackSlice,
  stored: StoredValues,
): { values: Float64Array; padding: number; overBorder: boolean } {
  const { grid, pixels } = slice.image;
  let count = 0;
  const overBorder = visitRuns(shape, grid, (from, end) => {
    count += end - from;
  });
  const values = new Float64Array(count);
  let n = 0;
  const { padding, rescale } = pixels;
  visitRuns(shape, grid, (from, end) => {
    if (padding === undefined && rescale !== undefined) {
      n = copyRun(stored, from, end, rescale, values, n);
      return;
    }
    for (let index = from; index < end; index++) {
      const value = stored[index] ?? 0;
      if (!isPadding(value, pixels)) values[n++] = rescaled(value, pixels);
    }
  });
  return { values: values.subarray(0, n), padding: count - n, overBorder };
}

/** The usual run, without padding and with slope and intercept. @returns the place after the last value */
function copyRun(
  stored: StoredValues,
  from: number,
  end: number,
  { slope, intercept }: { readonly slope: number; readonly intercept: number },
  values: Float64Array,
  at: number,
): number {
  let next = at;
  for (let index = from; index < end; index++)
    values[next++] = (stored[index] as number) * slope + intercept;
  return next;
}

interface MeasuredWhere {
  readonly stack: Stack;
  readonly sliceIndex: number;
  readonly offsetMm: number;
  readonly texture: NoiseOfStack;
  readonly beside: StackBeside | undefined;
}

function measureOnSlice(
  shape: Shape,
  slice: StackSlice,
  stored: StoredValues,
  { stack, sliceIndex, offsetMm, texture, beside }: MeasuredWhere,
): RegionValue {
  const { grid, acquisition } = slice.image;
  const { values, padding, overBorder } = regionValues(shape, slice, stored);
  const { n, mean, sd, min, max, median } = statistics(values);
  const standardError = regionStandardError(shape, slice, stored, texture);
  const placement =
    mean === undefined ? undefined : placementSensitivity(shape, slice, stored, mean);
  const flags: Flag[] = typeof standardError === 'number' ? [] : [standardError];
  if (padding > 0) flags.push(FLAGS.paddingInside(padding));
  if (min !== undefined && min < LOWEST_IMAGE_HU) flags.push(FLAGS.belowAir);
  if (overBorder) flags.push(FLAGS.overBorder);
  if (n === 0) flags.push(FLAGS.noPixels);
  if (n === 1) flags.push(FLAGS.onePixel);
  if (sd === 0) flags.push(FLAGS.zeroSd);
  if (mean !== undefined && placement === undefined) flags.push(FLAGS.noPlacement);
  if (acquisition.lossy) flags.push(FLAGS.lossy);
  if (median !== undefined) {
    const own = { slice, stored, noise: texture };
    flags.push(...regionFlags(shape, stack, own, { n, offsetMm, medianHu: median }, beside));
  }
  return {
    n,
    meanHu: mean ?? null,
    sdHu: sd ?? null,
    minHu: min ?? null,
    maxHu: max ?? null,
    medianHu: median ?? null,
    areaMm2: shapeArea(shape),
    sampledAreaMm2: n * grid.pixelSpacingMm[0] * grid.pixelSpacingMm[1],
    snr: mean !== undefined && sd !== undefined && sd > 0 ? mean / sd : null,
    sliceIndex,
    sliceOffsetMm: offsetMm,
    sopInstanceUid: slice.image.sopInstanceUid,
    frameNumber: frameNumber(slice),
    standardErrorHu: typeof standardError === 'number' ? standardError : null,
    placementHu: placement ?? null,
    flags,
  };
}

/** What a region has on a stack on which it must not be measured, and why. */
export function notMeasured(shape: Shape, why: Flag): RegionValue {
  return withoutValue(shape, null, null, null, [why]);
}

function withoutValue(
  shape: Shape,
  sliceIndex: number | null,
  sliceOffsetMm: number | null,
  slice: StackSlice | null,
  flags: readonly Flag[],
): RegionValue {
  return {
    n: 0,
    meanHu: null,
    sdHu: null,
    minHu: null,
    maxHu: null,
    medianHu: null,
    areaMm2: shapeArea(shape),
    sampledAreaMm2: 0,
    snr: null,
    sliceIndex,
    sliceOffsetMm,
    sopInstanceUid: slice?.image.sopInstanceUid ?? null,
    frameNumber: frameNumber(slice),
    standardErrorHu: null,
    placementHu: null,
    flags: flags.map(({ code, text }) => ({ code, text })),
  };
}

function frameNumber(slice: StackSlice | null): number | null {
  const frame = slice?.image.frame;
  return frame === undefined ? null : frame + 1;
}
