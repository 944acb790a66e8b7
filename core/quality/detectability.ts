import { type Result, refuse, success } from '../result.js';
import { besselPair } from './bessel.js';
import { FWHM_PER_SIGMA, type KernelTexture } from './kernelTexture.js';
import { powerAt } from './powerAt.js';

/** What of a texture tells how well a disc stands out. */
export type DiscTexture = Pick<KernelTexture, 'frequencyPerMm' | 'powerHu2Mm2' | 'blurFwhmMm'>;

/** Width of the frequency steps, per mm: blur and noise change little within one. */
const STEP_PER_MM = 0.005;
/** Beyond this, the blur has left less than a millionth of a disc's power. */
const TTF_SQUARE_LEFT = 1e-6;

/**
 * Detectability d′ of a disc of 1 HU by a matched filter that does not prewhiten (AAPM report 233, 2019; Samei et al.
 * 2019, doi 10.1002/mp.13763), so that d′ = contrast × this:
 *
 * d′² = [∬|W|²·TTF² du dv]² / ∬|W|²·TTF²·NPS du dv, with W the spectrum of the disc, A·2J₁(πDf)/(πDf).
 *
 * TTF is the Gaussian of the measured blur; a blur of 0 is TTF = 1. The power of a disc within a frequency f is
 * A·(1 − J₀²(πDf) − J₁²(πDf)) (the encircled energy of Airy's pattern: Born & Wolf, Principles of Optics, 8.5.2), so
 * each step has its exact share of it, however fast W turns. White noise gives d′ = contrast·√(A/NPS).
 *
 * Refused where the blur could not be measured: without it small discs would seem to stand out more than they do.
 * Refused too for a spectrum without power.
 */
export function detectabilityPerHu(texture: DiscTexture, diameterMm: number): Result<number> {
  if (!(diameterMm > 0)) throw new RangeError(`invalid diameter: ${diameterMm}`);
  const problem = textureProblem(texture);
  return problem ?? success(perHu(texture, diameterMm));
}

/** Detectability d′ of a disc of this contrast; its sign does not matter. */
export function detectability(
  texture: DiscTexture,
  diameterMm: number,
  contrastHu: number,
): Result<number> {
  const unit = detectabilityPerHu(texture, diameterMm);
  return unit.ok ? success(unit.value * Math.abs(contrastHu)) : unit;
}

/** Why a texture gives no detectability; undefined where it does. */
export function textureProblem({
  blurFwhmMm,
  frequencyPerMm,
  powerHu2Mm2,
}: DiscTexture): ReturnType<typeof refuse> | undefined {
  if (blurFwhmMm === null)
    return refuse('no-blur', 'The blur could not be measured: too few clean edges on both stacks.');
  if (frequencyPerMm.length < 2 || !powerHu2Mm2.some((power) => power > 0))
    return refuse('no-noise', 'The noise could not be measured: too few uniform areas.');
  return undefined;
}

/** A texture that has no problem. */
function perHu(texture: DiscTexture, diameterMm: number): number {
  const sigmaMm = (texture.blurFwhmMm ?? 0) / FWHM_PER_SIGMA;
  const last = texture.frequencyPerMm.at(-1) ?? 0;
  const decay = (2 * Math.PI * sigmaMm) ** 2;
  const end = sigmaMm > 0 ? Math.sqrt(-Math.log(TTF_SQUARE_LEFT) / decay) : last;
  const steps = Math.ceil(end / STEP_PER_MM);
  const areaMm2 = (Math.PI / 4) * diameterMm ** 2;
  let signal = 0;
  let noise = 0;
  let below = 0;
  for (let step = 0; step < steps; step += 1) {
    const middle = (step + 0.5) * STEP_PER_MM;
    const within = shareWithin(diameterMm, (step + 1) * STEP_PER_MM);
    const seen = (within - below) * Math.exp(-decay * middle * middle);
    below = within;
    signal += seen;
    noise += seen * powerAt(texture, middle);
  }
  // Without blur a disc has power beyond every limit; the noise there is that of the last ring.
  if (sigmaMm === 0) {
    signal += 1 - below;
    noise += (1 - below) * powerAt(texture, last);
  }
  return signal * Math.sqrt(areaMm2 / noise);
}

/** Share of a disc's power at frequencies up to this one. */
function shareWithin(diameterMm: number, frequencyPerMm: number): number {
  const { j0, j1 } = besselPair(Math.PI * diameterMm * frequencyPerMm);
  return 1 - j0 * j0 - j1 * j1;
}
