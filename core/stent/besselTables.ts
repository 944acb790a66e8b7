import { besselPair } from '../quality/index.js';
import { FREQUENCIES } from './frequencies.js';

/** Radii of the tables: k·step, mm. */
export const RADIUS_STEP_MM = 0.02;
export const RADII = 300;

/** J₀ and J₁ of 2πfr for all radii and frequencies, radius after radius. */
interface BesselTables {
  readonly j0: Float64Array;
  readonly j1: Float64Array;
}

let made: BesselTables | undefined;

/** Made at the first call: 24,000 places. */
export function besselTables(): BesselTables {
  if (made !== undefined) return made;
  const count = FREQUENCIES.length;
  const j0 = new Float64Array(RADII * count);
  const j1 = new Float64Array(RADII * count);
  for (let radius = 0; radius < RADII; radius += 1)
    FREQUENCIES.forEach((f, index) => {
      const pair = besselPair(2 * Math.PI * f * radius * RADIUS_STEP_MM);
      j0[radius * count + index] = pair.j0;
      j1[radius * count + index] = pair.j1;
    });
  made = { j0, j1 };
  return made;
}
