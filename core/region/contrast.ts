import { contrastFlags } from './contrastFlags.js';
import type { Flag, RegionValue } from './value.js';

/** Which SD is the noise of a contrast-to-noise ratio; results under different ones are not comparable. */
export type ContrastNoise = 'lumen' | 'wall' | 'reference' | 'pooled';

/** Formula of a contrast-to-noise ratio, as note and exports print it beside the value. */
export function contrastFormula(noise: ContrastNoise): string {
  const below = noise === 'pooled' ? '√((SD of lumen² + SD of wall²) / 2)' : `SD of ${noise}`;
  return `CNR = (lumen − wall) / ${below}`;
}

/** Formula of the signal-to-noise ratio. */
export const SNR_FORMULA = 'SNR = mean / SD of the same region';

/** A ratio, or null with the reason. */
export interface ContrastValue {
  readonly value: number | null;
  readonly flags: readonly Flag[];
}

/** Contrast-to-noise ratio (mean of lumen − mean of wall) / noise, on one kernel. */
export function contrastValue(parts: {
  readonly lumen: RegionValue;
  readonly wall: RegionValue;
  readonly reference?: RegionValue | undefined;
  readonly noise: ContrastNoise;
}): ContrastValue {
  const { lumen, wall } = parts;
  if (lumen.meanHu === null || wall.meanHu === null) {
    return without(
      'no-mean',
      `No contrast: the ${lumen.meanHu === null ? 'lumen' : 'wall'} has no mean.`,
    );
  }
  if (parts.noise === 'reference' && parts.reference === undefined) {
    return without('no-reference', 'No contrast: choose a reference region for the noise.');
  }
  const noise = noiseOf(parts);
  if (noise === null)
    return without('no-noise', `No contrast: no SD for the noise (${parts.noise}).`);
  if (noise === 0) return without('zero-noise', `No contrast: the noise (${parts.noise}) is zero.`);
  return { value: (lumen.meanHu - wall.meanHu) / noise, flags: contrastFlags(parts) };
}

function noiseOf(parts: Parameters<typeof contrastValue>[0]): number | null {
  const { lumen, wall, reference, noise } = parts;
  switch (noise) {
    case 'lumen':
      return lumen.sdHu;
    case 'wall':
      return wall.sdHu;
    case 'reference':
      return reference?.sdHu ?? null;
    case 'pooled':
      if (lumen.sdHu === null || wall.sdHu === null) return null;
      return Math.sqrt((lumen.sdHu ** 2 + wall.sdHu ** 2) / 2);
  }
}

function without(code: string, text: string): ContrastValue {
  return { value: null, flags: [{ code, text }] };
}
