import { BAND_END, type ComplexImage } from './gradientSpectrum.js';

/** Sums from which the likeness of two images, or of several pairs of them together, is made. */
export interface CorrelationSums {
  readonly cross: number;
  readonly first: number;
  readonly second: number;
}

/**
 * Correlation of two gradient spectra inside the band when the second is moved back by a shift.
 *
 * @param shift of the second against the first, samples
 */
export function gradientCorrelation(
  a: ComplexImage,
  b: ComplexImage,
  shift: { readonly column: number; readonly row: number },
): CorrelationSums {
  const { size } = a;
  const most = Math.ceil(BAND_END * size) - 1;
  let [cross, first, second] = [0, 0, 0];
  for (let ky = -most; ky <= most; ky += 1) {
    for (let kx = -most; kx <= most; kx += 1) {
      const x = kx / size;
      const y = ky / size;
      const radius = Math.sqrt(x * x + y * y);
      if (radius >= BAND_END) continue;
      const index = ((ky + size) % size) * size + ((kx + size) % size);
      const aRe = a.re[index] as number;
      const aIm = a.im[index] as number;
      const bRe = b.re[index] as number;
      const bIm = b.im[index] as number;
      const angle = 2 * Math.PI * (x * shift.column + y * shift.row);
      const weight = Math.cos((Math.PI / 2) * (radius / BAND_END)) ** 2;
      const real = aRe * bRe + aIm * bIm;
      const imaginary = aRe * bIm - aIm * bRe;
      cross += weight * (real * Math.cos(angle) - imaginary * Math.sin(angle));
      first += weight * (aRe * aRe + aIm * aIm);
      second += weight * (bRe * bRe + bIm * bIm);
    }
  }
  return { cross, first, second };
}

/** Normalised correlation of all pairs together: 1 for the same images, near 0 for such as have nothing in common. */
export function likeness(sums: readonly CorrelationSums[]): number {
  let [cross, first, second] = [0, 0, 0];
  for (const one of sums) {
    cross += one.cross;
    first += one.first;
    second += one.second;
  }
  return first > 0 && second > 0 ? cross / Math.sqrt(first * second) : 0;
}
