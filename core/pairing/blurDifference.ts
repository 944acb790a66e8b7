import type { ComplexImage } from './gradientSpectrum.js';
import { SQUARE_MARGIN } from './registrationPlaces.js';

/** Frequencies at which the two are compared, cycles per sample: above the window's own width, below sampling's. */
const FROM = 0.04;
const TO = 0.2;
/** More than this is no kernel but another image, samples²; the blur then reaches as far as squares have a margin. */
const MOST = (SQUARE_MARGIN / 3) ** 2;

/**
 * Difference of the squared widths of two blurs, second less first, samples²: the slope of the logarithm of their power
 * ratio over squared frequency. For Gaussian blurs it is exact; in filtered back projection noise and signal pass the
 * same kernel, so that both tell it.
 */
export function blurDifference(
  pairs: readonly { readonly first: ComplexImage; readonly second: ComplexImage }[],
): number {
  const size = pairs[0]?.first.size ?? 0;
  const bins = Math.ceil(TO * size) + 1;
  const powerA = new Float64Array(bins);
  const powerB = new Float64Array(bins);
  for (const { first, second } of pairs) {
    for (let ky = -bins; ky <= bins; ky += 1) {
      for (let kx = -bins; kx <= bins; kx += 1) {
        const bin = Math.round(Math.sqrt(kx * kx + ky * ky));
        if (bin >= bins) continue;
        const index = ((ky + size) % size) * size + ((kx + size) % size);
        powerA[bin] =
          (powerA[bin] ?? 0) + (first.re[index] ?? 0) ** 2 + (first.im[index] ?? 0) ** 2;
        powerB[bin] =
          (powerB[bin] ?? 0) + (second.re[index] ?? 0) ** 2 + (second.im[index] ?? 0) ** 2;
      }
    }
  }
  let [n, sx, sy, sxx, sxy] = [0, 0, 0, 0, 0];
  for (let bin = Math.ceil(FROM * size); bin < TO * size; bin += 1) {
    const [a, b] = [powerA[bin] ?? 0, powerB[bin] ?? 0];
    if (a <= 0 || b <= 0) continue;
    const x = (bin / size) ** 2;
    const y = Math.log(b / a);
    // Rings hold as many values as they are long.
    n += bin;
    sx += bin * x;
    sy += bin * y;
    sxx += bin * x * x;
    sxy += bin * x * y;
  }
  const spread = n * sxx - sx * sx;
  if (!(spread > 0)) return 0;
  const slope = (n * sxy - sx * sy) / spread;
  return Math.max(-MOST, Math.min(MOST, -slope / (4 * Math.PI ** 2)));
}
