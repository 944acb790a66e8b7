import type { Vec3 } from '../geometry/index.js';
import { type PixelRun, summedCovariance, textureCovariance } from './autocorrelation.js';
import type { KernelTexture } from './kernelTexture.js';
import { localNoiseShare } from './standardErrorPlace.js';

/**
 * Standard error of the mean of a region's pixels as the noise of its kernel makes it, HU: the root of
 * σ²/n²·ΣΣρ over all pairs of pixels, ρ the autocorrelation from the measured noise power spectrum. SD/√n would hold
 * for independent pixels only. It tells how far the mean of another scan of the same dose and kernel would lie;
 * structure within the region does not enter, and neither does blur or a misplaced outline.
 *
 * σ is the noise in the uniform areas near the region, see {@link localNoiseShare}; never the region's own SD, which
 * holds structure too. Undefined for no pixels, and for a region wider than 256 pixels.
 *
 * @param runs all pixels of the region, each once
 * @param spacingMm between columns, between rows
 */
export function standardErrorOfMean(
  runs: readonly PixelRun[],
  texture: KernelTexture,
  spacingMm: readonly [number, number],
  centreMm: Vec3,
): number | undefined {
  let [n, left, right, top, bottom] = [0, Infinity, -Infinity, Infinity, -Infinity];
  for (const { row, from, end } of runs) {
    n += end - from;
    left = Math.min(left, from);
    right = Math.max(right, end);
    top = Math.min(top, row);
    bottom = Math.max(bottom, row + 1);
  }
  if (n === 0) return undefined;
  const sums = textureCovariance(texture, spacingMm, Math.max(right - left, bottom - top));
  const sum = sums && summedCovariance(runs, sums);
  if (sum === undefined) return undefined;
  // Rounding must not make a variance negative.
  return (localNoiseShare(texture, centreMm) * Math.sqrt(Math.max(0, sum))) / n;
}
