import type { Apodisation } from './apodisation.js';
import { besselTables, RADII, RADIUS_STEP_MM } from './besselTables.js';
import { FREQUENCIES } from './frequencies.js';
import { type StentParameters, stentSpectrum } from './stentModel.js';

/** HU of a fitted stent over the distance from its axis, on each kernel, and the slope, HU/mm, at the tables' radii. */
export interface ModelProfile {
  readonly hu: Float64Array;
  readonly slope: Float64Array;
}

/** The profile of each kernel. */
export function modelProfiles(
  parameters: StentParameters,
  { kernels }: Apodisation,
): readonly ModelProfile[] {
  const { value } = stentSpectrum(parameters);
  const { j0, j1 } = besselTables();
  const size = FREQUENCIES.length;
  return kernels.map(({ response }, kernel) => {
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
    return { hu, slope };
  });
}

/** A table's value at a distance, straight between its radii; its last value beyond. */
export function atRadius(table: Float64Array, radiusMm: number): number {
  const place = radiusMm / RADIUS_STEP_MM;
  const below = Math.floor(place);
  if (below >= RADII - 1) return table[RADII - 1] as number;
  const part = place - below;
  return (1 - part) * (table[below] as number) + part * (table[below + 1] as number);
}
