import type { Apodisation } from './apodisation.js';
import { besselTables, RADII, RADIUS_STEP_MM } from './besselTables.js';
import { FREQUENCIES, RING_AREAS } from './frequencies.js';
import { cholesky, forwardSolve } from './linear.js';
import { atRadius, type ModelProfile } from './modelProfile.js';
import { distanceFrom, type VesselAxis } from './vesselAxis.js';
import type { SliceWindow } from './windows.js';

/** How far the axis has to be moved on one slice, with its standard error along each axis, mm. */
export interface CentreStep {
  readonly moveMm: readonly [number, number];
  readonly errorMm: number;
}

/** Annuli of the one-sided part, mm: their distance and number. */
const ANNULUS_MM = 0.4;
const COUNT = 12;
/** The one-sided part is read up to this distance beyond the struts, mm: farther out lies what is not of the vessel. */
const BEYOND_MM = 1.2;

/** Weights for the one-sided part of all kernels' annuli up to a radius. */
export interface CentreWeights {
  readonly kernels: number;
  readonly count: number;
  readonly lower: readonly Float64Array[];
}

/** Noise of the one-sided annular means of one slice: half the round power, once for each of two directions. */
export function centreWeights(
  apodisation: Apodisation,
  radiusMm: number,
): CentreWeights | undefined {
  const count = Math.min(COUNT, Math.floor((radiusMm + BEYOND_MM) / ANNULUS_MM) + 1);
  const waves = oneSidedWaves();
  const places = apodisation.kernels.flatMap(({ amplitude }) =>
    waves
      .slice(1, count)
      .map((wave) =>
        wave.map(
          (one, f) => one * (amplitude[f] as number) * Math.sqrt((RING_AREAS[f] as number) / 2),
        ),
      ),
  );
  const lower = cholesky(
    places.map((a, row) =>
      Float64Array.from(places, (b, column) => {
        let sum = row === column ? 1e-9 : 0;
        for (let f = 0; f < a.length; f += 1) sum += (a[f] as number) * (b[f] as number);
        return row === column ? sum * 1.1 : sum;
      }),
    ),
  );
  return lower === undefined ? undefined : { kernels: apodisation.kernels.length, count, lower };
}

/**
 * The move of the axis on one height that best explains what is one-sided around it, beside an even gradient of the
 * surroundings: a small move d along x leaves −d·cos θ·m′(ρ) of a round profile m.
 *
 * @param slices the slice of each kernel
 * @param spectrum of {@link stentSpectrum}
 */
export function centreStep(
  slices: readonly SliceWindow[],
  at: readonly [number, number],
  axis: VesselAxis,
  profiles: readonly ModelProfile[],
  spectrum: Float64Array,
  apodisation: Apodisation,
  { count, lower }: CentreWeights,
): CentreStep | undefined {
  const distance = distanceFrom(axis);
  const waves = oneSidedWaves();
  const size = count - 1;
  const [across, down, response, gradient] = Array.from(
    { length: 4 },
    () => new Float64Array(size * slices.length),
  ) as [Float64Array, Float64Array, Float64Array, Float64Array];
  slices.forEach(({ uMm, vMm, hu }, kernel) => {
    const model = profiles[kernel]?.hu as Float64Array;
    const weights = new Float64Array(count);
    const sums = [new Float64Array(count), new Float64Array(count)] as const;
    for (let index = 0; index < hu.length; index += 1) {
      const du = (uMm[index] as number) - at[0];
      const dv = (vMm[index] as number) - at[1];
      const rho = distance(du, dv);
      const place = rho / ANNULUS_MM;
      const inner = Math.floor(place);
      if (inner >= count || rho === 0) continue;
      const left = (hu[index] as number) - atRadius(model, rho);
      const plain = Math.hypot(du, dv);
      for (let side = 0; side < 2; side += 1) {
        const annulus = inner + side;
        if (annulus >= count) continue;
        const weight = side === 0 ? 1 - (place - inner) : place - inner;
        weights[annulus] = (weights[annulus] as number) + weight;
        sums[0][annulus] = (sums[0][annulus] as number) + (weight * left * du) / plain;
        sums[1][annulus] = (sums[1][annulus] as number) + (weight * left * dv) / plain;
      }
    }
    const own = apodisation.kernels[kernel]?.response as Float64Array;
    for (let annulus = 1; annulus < count; annulus += 1) {
      const place = kernel * size + annulus - 1;
      const weight = Math.max(1e-6, weights[annulus] as number);
      across[place] = (sums[0][annulus] as number) / weight;
      down[place] = (sums[1][annulus] as number) / weight;
      const wave = waves[annulus] as Float64Array;
      let sum = 0;
      for (let f = 0; f < wave.length; f += 1)
        sum +=
          (wave[f] as number) *
          (spectrum[f] as number) *
          (own[f] as number) *
          2 *
          Math.PI *
          (FREQUENCIES[f] as number);
      response[place] = sum / 2;
      gradient[place] = (annulus * ANNULUS_MM) / 2;
    }
  });
  const [r, g] = [forwardSolve(lower, response), forwardSolve(lower, gradient)];
  const [rr, rg, gg] = [dot(r, r), dot(r, g), dot(g, g)];
  const determinant = rr * gg - rg * rg;
  if (!(determinant > 0)) return undefined;
  const move = (side: Float64Array): number => {
    const values = forwardSolve(lower, side);
    return (gg * dot(r, values) - rg * dot(g, values)) / determinant;
  };
  return { moveMm: [move(across), move(down)], errorMm: Math.sqrt(gg / determinant) };
}

let made: readonly Float64Array[] | undefined;

/** Mean of J₁(2πfρ) over each annulus, as if it were filled evenly. */
function oneSidedWaves(): readonly Float64Array[] {
  if (made !== undefined) return made;
  const { j1 } = besselTables();
  const size = FREQUENCIES.length;
  made = Array.from({ length: COUNT }, (_, annulus) => {
    const waves = new Float64Array(size);
    let area = 0;
    for (let radius = 0; radius < RADII; radius += 1) {
      const mm = radius * RADIUS_STEP_MM;
      const weight = Math.max(0, 1 - Math.abs(mm / ANNULUS_MM - annulus)) * mm;
      if (weight === 0) continue;
      area += weight;
      for (let f = 0; f < size; f += 1)
        waves[f] = (waves[f] as number) + weight * (j1[radius * size + f] as number);
    }
    return waves.map((sum) => sum / area);
  });
  return made;
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let index = 0; index < a.length; index += 1)
    sum += (a[index] as number) * (b[index] as number);
  return sum;
}
