import type { KernelTexture } from '../quality/index.js';
import { type Result, refuse, success } from '../result.js';
import { FREQUENCIES, STEP_PER_MM } from './frequencies.js';
import { type Bounds, levenbergMarquardt } from './levenbergMarquardt.js';
import { shownRoots } from './shownRoots.js';
import { rolledResponse } from './windowRoll.js';

/** What one kernel does to a frequency, told by its noise. */
export interface Apodised {
  /** W at {@link FREQUENCIES}; 1 at frequency 0. */
  readonly response: Float64Array;
  /** √(NPS) at {@link FREQUENCIES}, HU·mm: c·√f·W. */
  readonly amplitude: Float64Array;
  /** What W is wrong by where its end is wrong by one standard error. */
  readonly endError: Float64Array;
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

/** Below it, areas of 12 mm don't tell the noise of one frequency from that of another, per mm. */
const LEAST_PER_MM = 0.14;
/** Least number of rings that tell a kernel. */
const LEAST_RINGS = 6;
/** Independent waves are fewer than areas have room for: areas share slices and lie close. */
const INDEPENDENT = 0.4;
/** Relative error of a ring that no number of areas takes away, and of the lowest, from which detrending took. */
const RING_ERROR = 0.01;
const LOW_RING_ERROR = 0.3;
const LOW_RING_PER_MM = 0.09;
/** Error of a ring's root relative to the highest root: rounding, spill. */
const FLOOR_ERROR = 0.008;
const LAST_RINGS_PER_MM = 0.1;
const LAST_RINGS_ERROR = 0.04;
/** W of a plain reconstruction falls from 1; more than this above it is another thing. */
const MOST_RESPONSE = 1.25;
/** Noise that has more power at low frequencies than f·W² allows by this factor is not of that kind. */
const MOST_LOW_POWER = 2.2;
/** Mean misfit of the rings' roots, relative, beyond which the spectra don't look like f·W² of one scale. */
const MOST_MISFIT = 0.1;

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

/** √(NPS/f) of a texture's rings, with the error of each. */
interface Rings {
  readonly f: readonly number[];
  readonly root: Float64Array;
  readonly error: Float64Array;
}

function ringsOf({ frequencyPerMm, powerHu2Mm2, areas }: KernelTexture): Rings {
  const kept = frequencyPerMm.flatMap((f, index) => (f >= LEAST_PER_MM ? [index] : []));
  const f = kept.map((index) => frequencyPerMm[index] as number);
  const root = Float64Array.from(kept, (index) =>
    Math.sqrt(Math.max(0, powerHu2Mm2[index] as number) / (frequencyPerMm[index] as number)),
  );
  const highest = Math.max(...root);
  const error = root.map((value, index) => {
    const at = f[index] as number;
    const relative = Math.hypot(
      ringError(at, areas),
      LOW_RING_ERROR * Math.exp(-at / LOW_RING_PER_MM),
    );
    // What the border of an area spills beyond the highest frequency of the grid comes back to the last rings.
    const back = at > (f.at(-1) as number) - LAST_RINGS_PER_MM ? LAST_RINGS_ERROR : 0;
    return Math.max(1e-9, relative * value + (FLOOR_ERROR + back) * highest);
  });
  return { f, root, error };
}

/** Relative standard error of a ring's root: 1/(2√n) of n independent waves, areas of 12 mm, rings of 0.08 per mm. */
function ringError(frequencyPerMm: number, areas: number): number {
  const waves = Math.max(1, INDEPENDENT * areas * Math.PI * frequencyPerMm * 0.08 * 140);
  return Math.hypot(1 / (2 * Math.sqrt(waves)), RING_ERROR);
}

function computed(textures: readonly KernelTexture[]): Result<Apodisation> {
  const all = textures.map(ringsOf);
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

interface FittedWindows {
  readonly scale: number;
  readonly scaleError: number;
  readonly responses: readonly {
    readonly response: Float64Array;
    readonly endError: Float64Array;
  }[];
  /** Of each kernel, root mean square of the rings' relative misfit where its root is not small. */
  readonly misfits: readonly number[];
}

const SHAPE_BOUNDS: readonly Bounds[] = [
  { low: -12, high: 2 },
  { low: -40, high: 20 },
  { low: -60, high: 20 },
  { low: 0.3, high: 1.6 },
];

/** The end lies about where the last ring stands out; SD of that, per mm. */
const END_SD_PER_MM = 0.12;
/** Rings tell an end to about this, per mm. */
const END_ERROR_PER_MM = 0.02;

/** One scale and four numbers of form for each kernel. */
function fittedWindows(all: readonly Rings[]): FittedWindows | undefined {
  const start = Float64Array.from([
    Math.log(Math.max(...all.map(({ root }) => root[0] as number))),
    ...all.flatMap(({ f, root, error }) => {
      const last = f.findLast((_, k) => (root[k] as number) > 4 * (error[k] as number)) ?? 1;
      return [-1 / last ** 2, -0.3 / last ** 4, 0, last + 0.06];
    }),
  ]);
  const bounds = [{ low: -20, high: 20 }, ...all.flatMap(() => SHAPE_BOUNDS)];
  const residuals = (point: Float64Array): Float64Array =>
    Float64Array.from(
      all.flatMap(({ f, root, error }, kernel) => {
        const roots = shownRoots(amplitudeAt(point, kernel), f);
        return [
          ...roots.map((value, k) => (value - (root[k] as number)) / (error[k] as number)),
          // Keeps the form smooth where the rings don't tell it.
          (point[3 + 4 * kernel] as number) / 8,
          ((point[4 + 4 * kernel] as number) - (start[4 + 4 * kernel] as number)) / END_SD_PER_MM,
        ];
      }),
    );
  const model = (point: Float64Array) => {
    const here = residuals(point);
    const slopes = Array.from(point, (value, k) => {
      const step = 1e-4 * Math.max(1, Math.abs(value));
      const moved = Float64Array.from(point);
      moved[k] = value + step;
      const there = residuals(moved);
      return there.map((one, index) => (one - (here[index] as number)) / step);
    });
    return { residuals: here, slopes };
  };
  const fit = levenbergMarquardt(model, start, bounds);
  if (fit === undefined) return undefined;
  const scale = Math.exp(fit.point[0] as number);
  const corrected = all.map((rings, kernel) => correctedResponse(fit.point, kernel, rings));
  return {
    scale,
    scaleError: Math.sqrt(fit.covariance[0]?.[0] ?? 1),
    responses: corrected,

    misfits: corrected.map(({ misfit }) => misfit),
  };
}

function responseAt(point: Float64Array, kernel: number): Float64Array {
  const [a = 0, b = 0, d = 0, endPerMm = 0] = point.subarray(1 + 4 * kernel, 5 + 4 * kernel);
  return rolledResponse({ a, b, d, endPerMm });
}

function amplitudeAt(point: Float64Array, kernel: number): Float64Array {
  const scale = Math.exp(point[0] as number);
  return responseAt(point, kernel).map(
    (w, index) => scale * w * Math.sqrt(FREQUENCIES[index] as number),
  );
}

/** Rings whose root is below this part of the highest correct nothing. */
const LEAST_ROOT = 0.25;

/** The form times a smooth factor that brings it to the rings. */
function correctedResponse(
  point: Float64Array,
  kernel: number,
  { f, root }: Rings,
): { readonly response: Float64Array; readonly endError: Float64Array; readonly misfit: number } {
  const response = responseAt(point, kernel);
  const later = Float64Array.from(point);
  later[4 + 4 * kernel] = (later[4 + 4 * kernel] as number) + END_ERROR_PER_MM;
  const roots = shownRoots(amplitudeAt(point, kernel), f);
  const highest = Math.max(...root);
  const used = f.flatMap((_, k) =>
    (f[k] as number) > 0.2 && (root[k] as number) > LEAST_ROOT * highest ? [k] : [],
  );
  const ratio = used.map((k) => (root[k] as number) / Math.max(1e-9, roots[k] as number));
  const at = (index: number): number => ratio[Math.min(ratio.length - 1, Math.max(0, index))] ?? 1;
  const smooth = ratio.map((_, k) => (at(k - 1) + 2 * at(k) + at(k + 1)) / 4);
  const ratios = used.map((k, index) => ({ f: f[k] as number, ratio: smooth[index] as number }));
  const misfit = Math.sqrt(
    ratio.reduce((sum, one) => sum + (one - 1) ** 2, 0) / Math.max(1, ratio.length),
  );
  return {
    response: response.map((w, index) => w * factorAt(ratios, FREQUENCIES[index] as number)),
    endError: responseAt(later, kernel).map((w, index) => w - (response[index] as number)),
    misfit,
  };
}

/** Straight between the rings, running out to 1 towards frequency 0 and as the last beyond the rings. */
function factorAt(
  ratios: readonly { readonly f: number; readonly ratio: number }[],
  f: number,
): number {
  const above = ratios.findIndex((ring) => ring.f >= f);
  const [upper, lower] = [ratios[above], ratios[above - 1] ?? { f: 0, ratio: 1 }];
  if (upper === undefined) return ratios.at(-1)?.ratio ?? 1;
  return lower.ratio + ((upper.ratio - lower.ratio) * (f - lower.f)) / (upper.f - lower.f);
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
