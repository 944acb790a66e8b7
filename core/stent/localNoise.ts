import { solveSymmetric } from './linear.js';
import { atPlace, type ModelProfile } from './modelProfile.js';
import { axisAt, distanceFrom, type VesselAxis } from './vesselAxis.js';
import type { KernelWindow } from './windows.js';

/** Noise around a vessel, seen on one kernel. */
export interface LocalNoise {
  readonly sdHu: number;
  /** Correlation of the noise of neighbouring slices: overlapping or thick slices share quanta. */
  readonly neighbours: number;
}

/** Looked at from this far beyond the struts, mm: struts that are wires have reached their end there. */
const FROM_MM = 0.7;
const TO_MM = 5.4;
/** Part of the noise that a second-order surface takes from such an annulus. */
const TAKEN = 0.04;

/**
 * SD of what neither the round model nor a second-order surface of each slice explains in the surroundings of a stent,
 * and how much of it neighbouring slices share. Undefined where too few pixels lie there.
 */
export function localNoise(
  { slices }: KernelWindow,
  axis: VesselAxis,
  profile: ModelProfile,
  radiusMm: number,
): LocalNoise | undefined {
  const distance = distanceFrom(axis);
  const left = slices.map(({ zMm, uMm, vMm, hu }) => {
    const [u, v] = axisAt(axis, zMm);
    const values = new Float64Array(hu.length).fill(Number.NaN);
    const used: number[] = [];
    for (let index = 0; index < hu.length; index += 1) {
      const [du, dv] = [(uMm[index] as number) - u, (vMm[index] as number) - v];
      const rho = distance(du, dv);
      if (rho < radiusMm + FROM_MM || rho > TO_MM) continue;
      used.push(index);
      values[index] = (hu[index] as number) - atPlace(profile, rho, du, dv);
    }
    return withoutSurface(values, used, uMm, vMm);
  });
  let [squares, count, products, pairs, both] = [0, 0, 0, 0, 0];
  left.forEach((values, slice) => {
    const next = left[slice + 1];
    values.forEach((value, index) => {
      if (Number.isNaN(value)) return;
      squares += value * value;
      count += 1;
      const other = next?.length === values.length ? next[index] : undefined;
      if (other === undefined || Number.isNaN(other)) return;
      products += value * other;
      both += (value * value + other * other) / 2;
      pairs += 1;
    });
  });
  if (count < 100) return undefined;
  return {
    sdHu: Math.sqrt(squares / count / (1 - TAKEN)),
    neighbours: pairs > 0 && both > 0 ? Math.min(0.95, Math.max(0, products / both)) : 0,
  };
}

/** Part of the slices that counts as independent, when neighbours share `r` and the next but one r². */
export function independentPart(slices: number, neighbours: number): number {
  let sum = 1;
  for (let apart = 1; apart < slices; apart += 1)
    sum += 2 * (1 - apart / slices) * neighbours ** apart;
  return 1 / sum;
}

function withoutSurface(
  values: Float64Array,
  used: readonly number[],
  uMm: Float64Array,
  vMm: Float64Array,
): Float64Array {
  const matrix = Array.from({ length: 6 }, () => new Float64Array(6));
  const right = new Float64Array(6);
  const termsAt = (index: number): readonly number[] => {
    const [u, v] = [(uMm[index] as number) / 5, (vMm[index] as number) / 5];
    return [1, u, v, u * u, u * v, v * v];
  };
  for (const index of used) {
    const terms = termsAt(index);
    terms.forEach((a, i) => {
      right[i] = (right[i] as number) + a * (values[index] as number);
      const line = matrix[i] as Float64Array;
      terms.forEach((b, j) => {
        line[j] = (line[j] as number) + a * b;
      });
    });
  }
  if (used.length < 20) return new Float64Array(values.length).fill(Number.NaN);
  matrix.forEach((line, index) => {
    line[index] = (line[index] as number) + 1e-6;
  });
  const surface = solveSymmetric(matrix, right);
  for (const index of used) {
    const terms = termsAt(index);
    values[index] =
      (values[index] as number) -
      terms.reduce((sum, term, k) => sum + term * (surface[k] as number), 0);
  }
  return values;
}
