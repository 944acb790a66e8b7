import type { StoredValues } from '../dicom/index.js';
import { isPadding } from '../intensity/index.js';
import { type KernelTexture, type PixelRun, standardErrorOfMean } from '../quality/index.js';
import type { StackSlice } from '../stack/index.js';
import { FLAGS } from './flags.js';
import { visitRuns } from './pixelsInside.js';
import { shapeCentre } from './plane.js';
import type { Shape } from './shape.js';
import type { Flag } from './value.js';

/** What the standard errors of a stack rest on: the texture of its noise, or why there is none. */
export type NoiseOfStack = KernelTexture | Flag;

/**
 * Standard error of the mean of a shape's pixels, HU, from the noise of the stack, padding left out; or the flag that
 * says why there is none.
 */
export function regionStandardError(
  shape: Shape,
  slice: StackSlice,
  stored: StoredValues,
  noise: NoiseOfStack,
): number | Flag {
  if ('code' in noise) return noise;
  const { grid, pixels } = slice.image;
  const runs: PixelRun[] = [];
  visitRuns(shape, grid, (start, stop) => {
    const row = Math.floor(start / grid.columns);
    const first = row * grid.columns;
    let from = start;
    if (pixels.padding !== undefined)
      for (let index = start; index < stop; index++) {
        if (!isPadding(stored[index] ?? 0, pixels)) continue;
        if (from < index) runs.push({ row, from: from - first, end: index - first });
        from = index + 1;
      }
    if (from < stop) runs.push({ row, from: from - first, end: stop - first });
  });
  if (runs.length === 0) return FLAGS.noStandardErrorWithoutPixels;
  const spacingMm = [grid.pixelSpacingMm[1], grid.pixelSpacingMm[0]] as const;
  return (
    standardErrorOfMean(runs, noise, spacingMm, shapeCentre(shape)) ?? FLAGS.noStandardErrorSoWide
  );
}
