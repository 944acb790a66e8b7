import type { Vec3 } from '../geometry/index.js';
import type { KernelTexture } from './kernelTexture.js';

/** Areas nearer than this all count alike, mm. */
const NEAR_MM = 15;

/**
 * The noise around a place as a share of the pooled one. Noise differs over a slice, since rays through more tissue
 * count fewer photons. Taken from the variances of the uniform areas, each with the weight 1/(15 mm² + distance²):
 * a mean that lies between the least and the greatest of them wherever the place is. 1 where the places are not known.
 */
export function localNoiseShare({ places, noiseSdHu }: KernelTexture, centreMm: Vec3): number {
  if (places === undefined || places.length === 0 || !(noiseSdHu > 0)) return 1;
  let [sum, weights] = [0, 0];
  for (const { centreMm: at, sdHu } of places) {
    const weight =
      1 /
      (NEAR_MM ** 2 +
        (at[0] - centreMm[0]) ** 2 +
        (at[1] - centreMm[1]) ** 2 +
        (at[2] - centreMm[2]) ** 2);
    sum += weight * sdHu ** 2;
    weights += weight;
  }
  return Math.sqrt(sum / weights) / noiseSdHu;
}
