import type { Apodisation } from './apodisation.js';
import { besselTables, RADII, RADIUS_STEP_MM } from './besselTables.js';
import { FREQUENCIES } from './frequencies.js';
import { type StentParameters, stentSpectrum } from './stentModel.js';

/** HU of a fitted stent over the distance from its axis, on each kernel, and the slope, HU/mm, at the tables' radii. */
export interface ModelProfile {
  readonly hu: Float64Array;
  readonly slope: Float64Array;
  /** Amplitudes of cos 2ψ and sin 2ψ at the tables' radii, where the kernel blurs more in one direction. */
  readonly twofold?: { readonly cos: Float64Array; readonly sin: Float64Array };
}

/** The profile of each kernel. */
export function modelProfiles(
  parameters: StentParameters,
  { kernels }: Apodisation,
): readonly ModelProfile[] {
  const { value } = stentSpectrum(parameters);
  const { j0, j1 } = besselTables();
  const size = FREQUENCIES.length;
  return kernels.map(({ response, twofold }, kernel) => {
    const level = parameters.fatHu + (kernel === 0 && kernels.length > 1 ? parameters.levelHu : 0);
    const hu = new Float64Array(RADII);
    const slope = new Float64Array(RADII);
    for (let radius = 0; radius < RADII; radius += 1) {
      let [sum, bend] = [level, 0];
      for (let f = 0; f < size; f += 1) {
        const wave = (value[f] as number) * (response[f] as number);
        sum += wave * (j0[radius * size + f] as number);
        bend -= wave * 2 * Math.PI * (FREQUENCIES[f] as number) * (j1[radius * size + f] as number);
      }
      hu[radius] = sum;
      slope[radius] = bend;
    }
    if (twofold === undefined) return { hu, slope };
    const { cos, sin } = twofold;
    return { hu, slope, twofold: { cos: secondOrder(value, cos), sin: secondOrder(value, sin) } };
  });
}

/** Hankel transform of the second order, with the sign of i²; J₂(x) = 2J₁(x)/x − J₀(x). */
function secondOrder(spectrum: Float64Array, amplitude: Float64Array): Float64Array {
  const { j0, j1 } = besselTables();
  const size = FREQUENCIES.length;
  const table = new Float64Array(RADII);
  for (let radius = 1; radius < RADII; radius += 1) {
    let sum = 0;
    for (let f = 0; f < size; f += 1) {
      const x = 2 * Math.PI * (FREQUENCIES[f] as number) * radius * RADIUS_STEP_MM;
      const j2 = (2 * (j1[radius * size + f] as number)) / x - (j0[radius * size + f] as number);
      sum -= (spectrum[f] as number) * (amplitude[f] as number) * j2;
    }
    table[radius] = sum;
  }
  return table;
}

/** HU of a fitted stent at a place beside its axis, whose distance from the axis is known. */
export function atPlace(
  { hu, twofold }: ModelProfile,
  radiusMm: number,
  uMm: number,
  vMm: number,
): number {
  const round = atRadius(hu, radiusMm);
  const square = uMm * uMm + vMm * vMm;
  if (twofold === undefined || square === 0) return round;
  return (
    round +
    (atRadius(twofold.cos, radiusMm) * (uMm * uMm - vMm * vMm) +
      atRadius(twofold.sin, radiusMm) * 2 * uMm * vMm) /
      square
  );
}

/** A table's value at a distance, straight between its radii; its last value beyond. */
export function atRadius(table: Float64Array, radiusMm: number): number {
  const place = radiusMm / RADIUS_STEP_MM;
  const below = Math.floor(place);
  if (below >= RADII - 1) return table[RADII - 1] as number;
  const part = place - below;
  return (1 - part) * (table[below] as number) + part * (table[below + 1] as number);
}
