import type { StoredValues } from '../dicom/index.js';
import { add, type SliceGrid, scale } from '../geometry/index.js';
import { isPadding, LOWEST_IMAGE_HU, rescaled } from '../intensity/index.js';
import type { Stack, StackSlice } from '../stack/index.js';
import { shapeArea } from './area.js';
import { moveShape } from './change.js';
import { findSlice } from './findSlice.js';
import { FLAGS } from './flags.js';
import { visitRuns } from './pixelsInside.js';
import type { Shape } from './shape.js';
import { statistics } from './statistics.js';
import type { Flag, RegionValue } from './value.js';

/** Stored values of a slice of the stack; undefined when it can't be had. */
export type StoredOf = (sliceIndex: number) => StoredValues | undefined;

/**
 * Measures a shape on one stack: on the nearest slice, over the pixels whose centres lie inside it, padding left
 * out, nothing resampled. What can't be had is null, and a flag says why.
 */
export function measureRegion(shape: Shape, stack: Stack, storedOf: StoredOf): RegionValue {
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
  return measureOnSlice(shape, slice, stored, sliceIndex, offsetMm);
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
  visitRuns(shape, grid, (from, end) => {
    for (let index = from; index < end; index++) {
      const value = stored[index] ?? 0;
      if (pixels.padding === undefined || !isPadding(value, pixels)) {
        values[n++] = rescaled(value, pixels);
      }
    }
  });
  return { values: values.subarray(0, n), padding: count - n, overBorder };
}

function measureOnSlice(
  shape: Shape,
  slice: StackSlice,
  stored: StoredValues,
  sliceIndex: number,
  offsetMm: number,
): RegionValue {
  const { grid, acquisition } = slice.image;
  const { values, padding, overBorder } = regionValues(shape, slice, stored);
  const { n, mean, sd, min, max, median } = statistics(values);
  const flags: Flag[] = [FLAGS.noStandardError];
  if (padding > 0) flags.push(FLAGS.paddingInside(padding));
  if (min !== undefined && min < LOWEST_IMAGE_HU) flags.push(FLAGS.belowAir);
  if (overBorder) flags.push(FLAGS.overBorder);
  if (n === 0) flags.push(FLAGS.noPixels);
  if (n === 1) flags.push(FLAGS.onePixel);
  if (sd === 0) flags.push(FLAGS.zeroSd);
  if (acquisition.lossy) flags.push(FLAGS.lossy);
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
    standardErrorHu: null,
    placementHu: mean === undefined ? null : placement(shape, slice, stored, mean),
    flags,
  };
}

/** How far the mean moves, at most, when the shape moves by half a pixel in eight directions, HU. */
function placement(
  shape: Shape,
  slice: StackSlice,
  stored: StoredValues,
  mean: number,
): number | null {
  let farthest = 0;
  for (const move of halfPixelMoves(slice.image.grid)) {
    const moved = meanInside(moveShape(shape, move), slice, stored);
    if (moved === undefined) return null;
    farthest = Math.max(farthest, Math.abs(moved - mean));
  }
  return farthest;
}

/** Mean alone: stored values are whole numbers, so their sum is exact, and the rescale comes once at the end. */
function meanInside(
  shape: Shape,
  { image: { grid, pixels } }: StackSlice,
  stored: StoredValues,
): number | undefined {
  const { padding } = pixels;
  let sum = 0;
  let n = 0;
  visitRuns(shape, grid, (from, end) => {
    for (let index = from; index < end; index++) {
      const value = stored[index] ?? 0;
      if (padding !== undefined && isPadding(value, pixels)) continue;
      sum += value;
      n++;
    }
  });
  return n === 0 ? undefined : rescaled(sum / n, pixels);
}

function halfPixelMoves({ rowDirection, columnDirection, pixelSpacingMm }: SliceGrid) {
  return Array.from({ length: 8 }, (_, eighth) => {
    const angle = (eighth * Math.PI) / 4;
    return add(
      scale(rowDirection, 0.5 * pixelSpacingMm[1] * Math.cos(angle)),
      scale(columnDirection, 0.5 * pixelSpacingMm[0] * Math.sin(angle)),
    );
  });
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
