import type { KernelTexture } from '../quality/index.js';

/** Directions over which the band is averaged. */
const DIRECTIONS = 48;

/**
 * SD of one sample of a profile by noise alone, HU: the noise power spectrum passed by the mean over the band,
 * ∫ NPS(f)·sinc²(b·f_across) df over the plane.
 */
export function profileNoiseHu(
  { frequencyPerMm, powerHu2Mm2 }: Pick<KernelTexture, 'frequencyPerMm' | 'powerHu2Mm2'>,
  bandMm: number,
): number {
  let variance = 0;
  frequencyPerMm.forEach((f, ring) => {
    const below = frequencyPerMm[ring - 1] ?? 0;
    const above = frequencyPerMm[ring + 1] ?? 2 * f - below;
    const area = 2 * Math.PI * f * ((above - below) / 2);
    let passed = 0;
    for (let direction = 0; direction < DIRECTIONS; direction += 1) {
      const across = f * Math.sin((Math.PI * (direction + 0.5)) / (2 * DIRECTIONS));
      const x = Math.PI * bandMm * across;
      passed += (x === 0 ? 1 : Math.sin(x) / x) ** 2 / DIRECTIONS;
    }
    variance += (powerHu2Mm2[ring] ?? 0) * area * passed;
  });
  return Math.sqrt(variance);
}
