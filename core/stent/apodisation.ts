import type { KernelTexture } from '../quality/index.js';
import { type Result, refuse, success } from '../result.js';
import { fittedWindows } from './fittedWindows.js';
import { FREQUENCIES, STEP_PER_MM } from './frequencies.js';
import { ringError, textureRings } from './textureRings.js';

/** What one kernel does to a frequency, told by its noise. */
export interface Apodised {
  /** W at {@link FREQUENCIES}; 1 at frequency 0. */
  readonly response: Float64Array;
  /** √(NPS) at {@link FREQUENCIES}, HU·mm: c·√f·W. */
  readonly amplitude: Float64Array;
  /** What W is wrong by where its end is wrong by one standard error. */
  readonly endError: Float64Array;
  /**
   * What goes twice round the circle, of images that the kernel blurs more in one direction than in the other: amplitudes of
   * cos 2φ and sin 2φ, φ from the u axis to the v axis. Absent where the kernel is the same in all directions.
   */
  readonly twofold?: { readonly cos: Float64Array; readonly sin: Float64Array };
}

/** All kernels of a fit, with how well their noise tells them. */
export interface Apodisation {
  readonly kernels: readonly Apodised[];
  /** Relative standard error of W that the kernels share at all but the lowest frequencies. */
  readonly scaleError: number;
  /** Relative standard error of W in a band of the given middle, shared by the kernels: they have the same quanta. */
  readonly bands: readonly { readonly atPerMm: number; readonly error: number }[];
}

/** Middles of the bands in which W may be wrong by itself, per mm; each is as wide as their distance. */
export const BAND_STEP_PER_MM = 0.2;
const BANDS = [0.3, 0.5, 0.7, 0.9, 1.1];

/** Least number of rings that tell a kernel. */
const LEAST_RINGS = 6;
/** W of a plain reconstruction falls from 1; more than this above it is another thing. */
const MOST_RESPONSE = 1.12;
/** The softer kernel passes nowhere more than the sharper one, but for what the rings leave open. */
const MOST_OVER_SHARP = 0.08;
/** Noise that has more power at low frequencies than f·W² allows by this factor is not of that kind. */
const MOST_LOW_POWER = 2.2;
/** Mean misfit of the rings' roots, relative, beyond which the spectra don't look like f·W² of one scale. */
const MOST_MISFIT = 0.1;
/**
 * Edges on the softer kernel rise over this part at least of what its noise lets expect. A linear reconstruction blurs both alike;
 * smoothing that keeps edges takes the noise and leaves them sharp.
 */
const LEAST_RISE_PART = 0.88;

const KNOWN = new WeakMap<
  KernelTexture,
  { with: KernelTexture | undefined; found: Result<Apodisation> }
>();

/**
 * The apodisation of each kernel from its noise power spectrum: filtered back projection makes NPS = c²·f·W(f)²
 * (Riederer, Pelc & Chesler 1978, doi 10.1088/0031-9155/23/3/008; Kijewski & Judy 1987, doi
 * 10.1088/0031-9155/32/5/003), so √(NPS/f) is W up to the scale c. The kernels share c, because they share their
 * quanta. Windows of a common form are fitted to the rings of all kernels with one c, through what areas of 12 mm show
 * of them; then each is scaled to the rings, smoothly, where the form does not hold. Kept for the textures given last.
 *
 * @param textures one, or the softer and the sharper
 * @returns refused where the spectrum doesn't look like that
 */
export function apodisationOf(textures: readonly KernelTexture[]): Result<Apodisation> {
  const [first, second] = textures;
  if (first === undefined || textures.length > 2)
    throw new RangeError(`invalid number of textures: ${textures.length}`);
  const known = KNOWN.get(first);
  if (known !== undefined && known.with === second) return known.found;
  const found = computed(textures);
  KNOWN.set(first, { with: second, found });
  return found;
}

function computed(textures: readonly KernelTexture[]): Result<Apodisation> {
  const all = textures.map((texture, kernel) => textureRings(texture, kernel, textures.length));
  if (all.some(({ f, root }) => f.length < LEAST_RINGS || !(Math.max(...root) > 0)))
    return refuse('not-linear', 'The noise tells too few frequencies to know the kernels by.');
  const fit = fittedWindows(all);
  if (
    fit === undefined ||
    !(Math.min(...fit.misfits) <= MOST_MISFIT) ||
    !(Math.max(...fit.misfits) <= 1.5 * MOST_MISFIT)
  )
    return refuse(
      'not-linear',
      'The noise does not look like that of filtered back projection: the blur of the kernels can’t be told from it.',
    );
  const { scale } = fit;
  const kernels = fit.responses.map(
    ({ response, endError }): Apodised => ({
      response,
      endError,
      amplitude: response.map((w, index) => scale * w * Math.sqrt(FREQUENCIES[index] as number)),
    }),
  );
  const [soft, sharp] = kernels;
  const crossed =
    sharp !== undefined &&
    soft?.response.some((w, index) => w > (sharp.response[index] as number) + MOST_OVER_SHARP);
  if (crossed)
    return refuse(
      'not-linear',
      'The noise of the two kernels does not meet at low frequencies, as that of one acquisition does after filtered back projection: their blur can’t be told from it.',
    );
  const [softRise] = fit.riseParts;
  if (sharp !== undefined && typeof softRise === 'number' && softRise < LEAST_RISE_PART)
    return refuse(
      'not-linear',
      'The edges are sharper than the noise lets expect, as after smoothing that keeps edges: the blur of the kernels can’t be told from the noise.',
    );
  if (textures.some((texture, k) => !looksLinear(texture, kernels[k] as Apodised)))
    return refuse(
      'not-linear',
      'The noise has more power at low frequencies than that of filtered back projection: the blur of the kernels can’t be told from it.',
    );
  const areas = Math.min(...textures.map((texture) => texture.areas));
  return success({
    kernels,
    scaleError: Math.max(0.01, fit.scaleError),
    bands: BANDS.map((atPerMm) => ({ atPerMm, error: ringError(atPerMm, areas) })),
  });
}

/** Whether noise has no more at low frequencies than the ramp leaves, and W falls as that of a kernel. */
function looksLinear(texture: KernelTexture, { response, amplitude }: Apodised): boolean {
  if (response.some((value) => value > MOST_RESPONSE)) return false;
  let [seen, allowed] = [0, 0];
  texture.frequencyPerMm.forEach((f, index) => {
    if (f < 0.05 || f > 0.2) return;
    seen += texture.powerHu2Mm2[index] ?? 0;
    const place = Math.min(FREQUENCIES.length - 1, Math.round(f / STEP_PER_MM - 0.5));
    allowed += (amplitude[place] as number) ** 2;
  });
  return seen <= MOST_LOW_POWER * allowed;
}
