import type { Annuli } from './annuli.js';
import { annuliCovariance, type Uncertainty } from './annuliCovariance.js';
import {
  type Bounds,
  type LeastSquares,
  type Linearised,
  levenbergMarquardt,
} from './levenbergMarquardt.js';
import { cholesky, forwardSolve } from './linear.js';
import {
  listOf,
  PARAMETERS,
  parametersOf,
  type StentParameters,
  stentSpectrum,
} from './stentModel.js';

/** The round part of the images explained by a stent. */
export interface RoundFit extends LeastSquares {
  readonly parameters: StentParameters;
  /** Sum of squares of the means alone, without what the expectations add. */
  readonly meanSquares: number;
  /** Lower triangle of the means' covariance, with which they were weighted. */
  readonly lower: readonly Float64Array[];
}

/** What is usual of a vessel and a scanner, mean and SD: common practice, no source. It holds where the images tell nothing. */
const EXPECTED: Partial<Record<keyof StentParameters, readonly [number, number]>> = {
  wallWidthMm: [0.5, 0.4],
  blurSigmaMm: [0.25, 0.15],
  wallHu: [50, 40],
  levelHu: [0, 5],
};

/** Parameters are sought within these; a ring radius or lumen on its bound is no result. */
export const BOUNDS: Readonly<Record<keyof StentParameters, Bounds>> = {
  radiusMm: { low: 0.85, high: 2.6 },
  wallWidthMm: { low: 0.02, high: 1.6 },
  blurSigmaMm: { low: 0.02, high: 0.7 },
  lumenHu: { low: -200, high: 1000 },
  massHuMm: { low: -300, high: 2500 },
  wallHu: { low: -150, high: 300 },
  fatHu: { low: -300, high: 300 },
  levelHu: { low: -40, high: 40 },
};

const START: Omit<StentParameters, 'radiusMm'> = {
  wallWidthMm: 0.5,
  blurSigmaMm: 0.25,
  lumenHu: 250,
  massHuMm: 400,
  wallHu: 50,
  fatHu: -60,
  levelHu: 0,
};
/** Radii that are tried first, with all else that isn't linear held. */
const TRIED_MM = [0.95, 1.1, 1.25, 1.4, 1.55, 1.7, 1.85, 2, 2.15, 2.3, 2.45];
const HELD: readonly (keyof StentParameters)[] = ['radiusMm', 'wallWidthMm', 'blurSigmaMm'];

/**
 * Fits the stent to the annular means of all kernels together, weighted with their covariance (generalised least
 * squares). Without a start, a row of radii is tried, and the search begins from the two best.
 */
export function fitRound(
  annuli: readonly Annuli[],
  uncertainty: Uncertainty,
  start?: StentParameters,
  fixed: Partial<StentParameters> = {},
): RoundFit | undefined {
  const starts = start === undefined ? triedRadii(annuli, uncertainty, fixed) : [start];
  const fits = starts.flatMap((one) => {
    const first = fitOnce(annuli, uncertainty, one, fixed);
    return first === undefined ? [] : [first];
  });
  const [best] = fits.toSorted((a, b) => a.squares - b.squares);
  if (best === undefined) return undefined;
  // The covariance holds what errors of W do to this very stent: once more with the stent that was found.
  return fitOnce(annuli, uncertainty, best.parameters, fixed);
}

function triedRadii(
  annuli: readonly Annuli[],
  uncertainty: Uncertainty,
  fixed: Partial<StentParameters>,
): readonly StentParameters[] {
  return TRIED_MM.flatMap((radiusMm) => {
    const start = { ...START, radiusMm };
    const held = Object.fromEntries(HELD.map((name) => [name, start[name]]));
    const fit = fitOnce(annuli, uncertainty, start, { ...held, ...fixed });
    return fit === undefined ? [] : [fit];
  })
    .sort((a, b) => a.squares - b.squares)
    .slice(0, 2)
    .map(({ parameters }) => parameters);
}

/**
 * One search with a covariance that belongs to the start, or with one that is given.
 *
 * @param measured the annular means, where others than those of the images are to be fitted
 */
export function fitOnce(
  annuli: readonly Annuli[],
  uncertainty: Uncertainty,
  start: StentParameters,
  fixed: Partial<StentParameters>,
  measured = Float64Array.from(annuli.flatMap(({ meanHu }) => Array.from(meanHu))),
  given?: readonly Float64Array[],
): RoundFit | undefined {
  const begin = { ...start, ...fixed };
  const lower =
    given ?? cholesky(annuliCovariance(annuli, stentSpectrum(begin).value, uncertainty));
  if (lower === undefined) return undefined;
  const bounds = PARAMETERS.map((name): Bounds => {
    const value = fixed[name];
    const single = name === 'levelHu' && annuli.length < 2 ? 0 : value;
    return single === undefined ? BOUNDS[name] : { low: single, high: single };
  });
  const fit = levenbergMarquardt(
    (point) => weighted(annuli, uncertainty, lower, measured, point),
    listOf(begin),
    bounds,
  );
  if (fit === undefined) return undefined;
  const { residuals } = weighted(annuli, uncertainty, lower, measured, fit.point);
  const meanSquares = residuals
    .subarray(0, measured.length)
    .reduce((sum, value) => sum + value * value, 0);
  return { ...fit, parameters: parametersOf(fit.point), meanSquares, lower };
}

/** Residuals (model − measured) and slopes in units of their standard errors, and those of the expectations. */
function weighted(
  annuli: readonly Annuli[],
  uncertainty: Uncertainty,
  lower: readonly Float64Array[],
  measured: Float64Array,
  point: Float64Array,
): Linearised {
  const { value, slopes } = roundModel(annuli, uncertainty, parametersOf(point));
  const expected = PARAMETERS.flatMap((name, k) => {
    const [mean, sd] = EXPECTED[name] ?? [0, 0];
    return sd > 0 ? [{ k, mean, sd }] : [];
  });
  const extended = (
    values: Float64Array,
    extra: (k: number, mean: number, sd: number) => number,
  ) => {
    const whitened = forwardSolve(lower, values);
    const all = new Float64Array(whitened.length + expected.length);
    all.set(whitened);
    expected.forEach(({ k, mean, sd }, index) => {
      all[whitened.length + index] = extra(k, mean, sd);
    });
    return all;
  };
  return {
    residuals: extended(
      value.map((one, index) => one - (measured[index] as number)),
      (k, mean, sd) => ((point[k] as number) - mean) / sd,
    ),
    slopes: slopes.map((slope, parameter) =>
      extended(slope, (k, _mean, sd) => (k === parameter ? 1 / sd : 0)),
    ),
  };
}

/** The annular means that a stent has, kernel after kernel, and their derivatives. */
export function roundModel(
  annuli: readonly Annuli[],
  { apodisation }: Pick<Uncertainty, 'apodisation'>,
  parameters: StentParameters,
): { readonly value: Float64Array; readonly slopes: readonly Float64Array[] } {
  const spectrum = stentSpectrum(parameters);
  const [fat, level] = [PARAMETERS.indexOf('fatHu'), PARAMETERS.indexOf('levelHu')];
  const places = annuli.flatMap(({ waves }, kernel) => {
    const response = apodisation.kernels[kernel]?.response as Float64Array;
    return waves.map((wave) => ({
      kernel,
      wave: wave.map((one, f) => one * (response[f] as number)),
    }));
  });
  const through = (list: Float64Array) =>
    Float64Array.from(places, ({ wave }) => {
      let sum = 0;
      for (let f = 0; f < wave.length; f += 1) sum += (wave[f] as number) * (list[f] as number);
      return sum;
    });
  const levelOf = (kernel: number): number => (kernel === 0 && annuli.length > 1 ? 1 : 0);
  const value = through(spectrum.value);
  places.forEach(({ kernel }, index) => {
    value[index] =
      (value[index] as number) + parameters.fatHu + levelOf(kernel) * parameters.levelHu;
  });
  const slopes = spectrum.slopes.map((slope, k) => {
    const waves = through(slope);
    if (k === fat) return waves.map((one) => one + 1);
    if (k === level) return waves.map((_, index) => levelOf(places[index]?.kernel as number));
    return waves;
  });
  return { value, slopes };
}
