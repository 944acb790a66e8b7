import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ctSlice } from './ctSlice.js';
import { change } from './element.js';

/** Side of its slices, pixels, and of a pixel, mm. */
export const EDGE_SIDE = 160;
export const EDGE_PIXEL_MM = 0.4;
/** σ of the blur of each kernel, mm, and the step of the edge, HU. */
export const EDGE_SIGMA_MM = { soft: 0.8, sharp: 0.4 } as const;
export const EDGE_STEP_HU = 400;
/** The edge leans by this against the columns, radians. */
export const EDGE_LEAN = 0.15;

const SLICES = 5;
const NOISE_HU = { soft: 6, sharp: 15 } as const;

/**
 * Writes a pair of stacks whose left half is 0 HU and whose right half is higher by a step, through the middle of each
 * slice, blurred by a Gaussian that is known, with noise: white on the sharp kernel, smoothed on the soft one.
 */
export function writeEdgePair(folder: string): void {
  mkdirSync(folder, { recursive: true });
  for (const kernel of ['soft', 'sharp'] as const) {
    const noise = noiseField(kernel === 'soft' ? 1 : 2);
    for (let z = 0; z < SLICES; z += 1) {
      const number = kernel === 'soft' ? 3 : 4;
      const options = {
        rows: EDGE_SIDE,
        columns: EDGE_SIDE,
        stored: slice(kernel, noise, z),
        series: `2.25.9.${number}`,
        number: z + 1,
        z: z * 0.6,
        change: change(
          { tag: 0x00200011, vr: 'IS', value: number },
          { tag: 0x00181210, vr: 'SH', value: kernel === 'soft' ? 'K3' : 'K4' },
          { tag: 0x00280030, vr: 'DS', value: [EDGE_PIXEL_MM, EDGE_PIXEL_MM] },
        ),
      };
      writeFileSync(join(folder, `${number}-${z}`), ctSlice(options));
    }
  }
}

function slice(kernel: 'soft' | 'sharp', noise: Float64Array, z: number): Int16Array {
  const sigma = EDGE_SIGMA_MM[kernel];
  const middle = (EDGE_SIDE - 1) / 2;
  return Int16Array.from({ length: EDGE_SIDE * EDGE_SIDE }, (_, index) => {
    const x = ((index % EDGE_SIDE) - middle) * EDGE_PIXEL_MM;
    const y = (Math.floor(index / EDGE_SIDE) - middle) * EDGE_PIXEL_MM;
    const across = x * Math.cos(EDGE_LEAN) + y * Math.sin(EDGE_LEAN);
    const own = noise[(index + z * 7919) % noise.length] ?? 0;
    return Math.round(1024 + EDGE_STEP_HU * gaussianStep(across / sigma) + own * NOISE_HU[kernel]);
  });
}

/** Φ(z) by the logistic series of Marsaglia 2004 (Journal of Statistical Software 11(4)), exact to double precision. */
export function gaussianStep(z: number): number {
  if (z > 7) return 1;
  if (z < -7) return 0;
  let [sum, term, last] = [z, z, 0];
  for (let k = 3; sum !== last; k += 2) {
    last = sum;
    term *= (z * z) / k;
    sum += term;
  }
  return 0.5 + (sum * Math.exp(-0.5 * z * z)) / Math.sqrt(2 * Math.PI);
}

/** Unit noise from a fixed seed, averaged over squares of so many pixels, scaled back to SD 1. */
function noiseField(seed: number): Float64Array {
  let state = seed;
  const uniform = (): number => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return (state + 0.5) / 2 ** 32;
  };
  const white = Float64Array.from(
    { length: EDGE_SIDE * EDGE_SIDE },
    () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform()),
  );
  if (seed !== 1) return white;
  const at = (row: number, column: number): number =>
    white[((row + EDGE_SIDE) % EDGE_SIDE) * EDGE_SIDE + ((column + EDGE_SIDE) % EDGE_SIDE)] ?? 0;
  return white.map((_, index) => {
    const [row, column] = [Math.floor(index / EDGE_SIDE), index % EDGE_SIDE];
    let sum = 0;
    for (let dr = -1; dr <= 1; dr += 1)
      for (let dc = -1; dc <= 1; dc += 1) sum += at(row + dr, column + dc);
    return sum / 3;
  });
}
