import type { RayRange } from './projectInsets.js';

/**
 * Gaussian aperture of a detector, as weights for rays that lie `rays` to a pitch. Weights sum to 1 and reach
 * 4 standard deviations. Without blur the one ray nearest the detector's centre is taken.
 */
export interface Aperture {
  readonly rays: number;
  /** Rays of one view: what the weights need beyond the detectors at both ends is there. */
  readonly count: number;
  /** Place of ray 0 relative to detector 0, in pitches. */
  readonly first: number;
  readonly weights: Float64Array;
}

export function gaussianAperture(
  detectors: number,
  pitchMm: number,
  sigmaMm: number,
  rays: number,
): Aperture {
  const reach = Math.ceil((4 * sigmaMm * rays) / pitchMm);
  const weights = new Float64Array(2 * reach + 1);
  let sum = 0;
  for (let index = 0; index < weights.length; index += 1) {
    const distanceMm = ((index - reach) * pitchMm) / rays;
    const weight = sigmaMm > 0 ? Math.exp(-(distanceMm ** 2) / (2 * sigmaMm ** 2)) : 1;
    weights[index] = weight;
    sum += weight;
  }
  return {
    rays,
    count: (detectors - 1) * rays + weights.length,
    first: -reach / rays,
    weights: weights.map((weight) => weight / sum),
  };
}

/** Adds to each detector what it sees of the rays of one view; rays outside `touched` are known to be 0. */
export function collectRays(
  { rays, weights }: Aperture,
  values: Float64Array,
  touched: RayRange,
  detectors: Float64Array,
): void {
  const from = Math.max(0, Math.ceil((touched.from - weights.length + 1) / rays));
  const to = Math.min(detectors.length, Math.ceil(touched.to / rays));
  for (let detector = from; detector < to; detector += 1) {
    const start = detector * rays;
    let sum = 0;
    for (let index = 0; index < weights.length; index += 1)
      sum += (weights[index] ?? 0) * (values[start + index] ?? 0);
    detectors[detector] = (detectors[detector] ?? 0) + sum;
  }
}
