import { besselTables, RADII, RADIUS_STEP_MM } from './besselTables.js';
import { FREQUENCIES } from './frequencies.js';
import { axisAt, distanceFrom, type VesselAxis } from './vesselAxis.js';
import type { KernelWindow } from './windows.js';

/**
 * Means of one kernel over overlapping annuli around the axis, over all slices: what of the image is round. Each
 * annulus is a hat over the distance from the axis. Whatever doesn't go round (single wires, a gradient) falls out.
 */
export interface Annuli {
  /** Middle of each annulus, mm. */
  readonly radiusMm: readonly number[];
  readonly meanHu: Float64Array;
  /** Mean of J₀(2πfρ) over the pixels of each annulus, at {@link FREQUENCIES}: what a round wave of f shows there. */
  readonly waves: readonly Float64Array[];
  readonly slices: number;
}

/** Distance of annuli, and the widest they go to, mm. */
export const ANNULUS_MM = 0.3;

/** Annuli up to a distance from the axis, mm. */
export function annuliOf(window: KernelWindow, axis: VesselAxis, reachMm: number): Annuli {
  const count = Math.floor(reachMm / ANNULUS_MM) + 1;
  const sums = new Float64Array(count);
  const weights = new Float64Array(count);
  const shares = Array.from({ length: count }, () => new Float64Array(RADII));
  const distance = distanceFrom(axis);
  for (const { zMm, uMm, vMm, hu } of window.slices) {
    const [u, v] = axisAt(axis, zMm);
    for (let index = 0; index < hu.length; index += 1) {
      const rho = distance((uMm[index] as number) - u, (vMm[index] as number) - v);
      const place = rho / ANNULUS_MM;
      const inner = Math.floor(place);
      if (inner >= count) continue;
      const part = place - inner;
      const cell = rho / RADIUS_STEP_MM;
      const below = Math.min(RADII - 2, Math.floor(cell));
      const beyond = cell - below;
      for (let side = 0; side < 2; side += 1) {
        const annulus = inner + side;
        if (annulus >= count) continue;
        const weight = side === 0 ? 1 - part : part;
        sums[annulus] = (sums[annulus] as number) + weight * (hu[index] as number);
        weights[annulus] = (weights[annulus] as number) + weight;
        const share = shares[annulus] as Float64Array;
        share[below] = (share[below] as number) + weight * (1 - beyond);
        share[below + 1] = (share[below + 1] as number) + weight * beyond;
      }
    }
  }
  // The innermost annulus holds few pixels; where it holds none it is left out.
  const kept = Array.from({ length: count }, (_, index) => index).filter(
    (index) => (weights[index] as number) > 0.5,
  );
  return {
    radiusMm: kept.map((index) => index * ANNULUS_MM),
    meanHu: Float64Array.from(
      kept,
      (index) => (sums[index] as number) / (weights[index] as number),
    ),
    waves: kept.map((index) => wavesOf(shares[index] as Float64Array, weights[index] as number)),
    slices: window.slices.length,
  };
}

function wavesOf(share: Float64Array, weight: number): Float64Array {
  const { j0 } = besselTables();
  const size = FREQUENCIES.length;
  const waves = new Float64Array(size);
  for (let radius = 0; radius < RADII; radius += 1) {
    const part = share[radius] as number;
    if (part === 0) continue;
    const scaled = part / weight;
    for (let index = 0; index < size; index += 1)
      waves[index] = (waves[index] as number) + scaled * (j0[radius * size + index] as number);
  }
  return waves;
}
