import type { Sinogram } from './parallelScan.js';
import { poissonSource } from './poissonSource.js';
import type { UniformSource } from './uniformSource.js';

/**
 * Line integrals as counted photons give them: ln(I₀/N) with N ~ Poisson(I₀·e^−p). A detector that counts none is
 * taken to have counted half a photon; with I₀·e^−p above 100 that never happens.
 */
export function addQuantumNoise(
  sinogram: Sinogram,
  photonsPerRay: number,
  uniform: UniformSource,
): Sinogram {
  if (!(photonsPerRay > 0)) throw new RangeError(`invalid photons per ray: ${photonsPerRay}`);
  const poisson = poissonSource(uniform);
  return sinogram.map((p) =>
    Math.log(photonsPerRay / Math.max(0.5, poisson(photonsPerRay * Math.exp(-p)))),
  );
}
