import type { KernelTexture } from './kernelTexture.js';

/**
 * Noise power of a texture at any frequency, HU²mm²: straight between the frequencies at which its spectrum is told,
 * and that of the first or the last one beyond them. What sampling folds back lies as high as the last ring.
 */
export function powerAt(
  { frequencyPerMm, powerHu2Mm2 }: Pick<KernelTexture, 'frequencyPerMm' | 'powerHu2Mm2'>,
  wantedPerMm: number,
): number {
  const above = frequencyPerMm.findIndex((frequency) => frequency >= wantedPerMm);
  if (above < 0) return powerHu2Mm2.at(-1) ?? 0;
  const upper = powerHu2Mm2[above] ?? 0;
  if (above === 0) return upper;
  const [low, high] = [frequencyPerMm[above - 1] ?? 0, frequencyPerMm[above] ?? 0];
  const lower = powerHu2Mm2[above - 1] ?? 0;
  return lower + ((upper - lower) * (wantedPerMm - low)) / (high - low);
}
