import type { Vec3 } from '../geometry/index.js';

/**
 * Noise and blur of one kernel, measured in the same uniform areas and edges of both stacks: what the trust in a
 * value of that kernel rests on. Plain data, so that it travels between workers and into the note.
 */
export interface KernelTexture {
  /** SD in uniform areas, pooled, HU. */
  readonly noiseSdHu: number;
  /** Number of uniform areas. */
  readonly areas: number;
  /** Radial noise power spectrum up to this stack's own highest frequency, ascending, without frequency 0. */
  readonly frequencyPerMm: readonly number[];
  readonly powerHu2Mm2: readonly number[];
  /** Mean frequency of it, in the one-dimensional form, and frequency of its peak. */
  readonly meanPerMm: number;
  readonly peakPerMm: number;
  /** 10–90 % edge rise distance, mm; null where both stacks show no clean edge in common. */
  readonly riseMm: number | null;
  /** Full width at half maximum of the Gaussian blur with that rise, mm. */
  readonly blurFwhmMm: number | null;
  /** Where the noise was measured, and its SD there: noise differs over a slice. */
  readonly places?: readonly TexturePlace[] | undefined;
}

/** The noise of one uniform area. */
export interface TexturePlace {
  /** Patient space. */
  readonly centreMm: Vec3;
  readonly sdHu: number;
  /** Mean there: the brightest of them is enhanced blood. Notes of earlier versions have none. */
  readonly meanHu?: number | undefined;
}

/** Textures of both kernels of a pair; null where they could not be measured. */
export interface PairTexture {
  readonly soft: KernelTexture | null;
  readonly sharp: KernelTexture | null;
}

/** FWHM = 2√(2 ln 2)·σ of a Gaussian; its edge rises from 10 to 90 % over 2·1.2815516·σ. */
export const FWHM_PER_SIGMA = 2 * Math.sqrt(2 * Math.LN2);
export const RISE_PER_SIGMA = 2.5631031310892007;

/** Full width at half maximum of the Gaussian blur whose edge has this 10–90 % rise, mm. */
export function blurOfRise(riseMm: number): number {
  return (riseMm / RISE_PER_SIGMA) * FWHM_PER_SIGMA;
}
