import type { Annuli } from './annuli.js';
import { annuliCovariance, type Uncertainty } from './annuliCovariance.js';
import {
  type Bounds,
  type LeastSquares,
  levenbergMarquardt,
  MOST_STEPS,
} from './levenbergMarquardt.js';
import { cholesky } from './linear.js';
import { roundProblem } from './roundProblem.js';
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
const TRIED_MM = [0.95, 1.13, 1.31, 1.49, 1.67, 1.85, 2.03, 2.21, 2.39];
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
  if (start !== undefined) return fitOnce(annuli, uncertainty, start, fixed);
  const starts = triedRadii(annuli, uncertainty, fixed);
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

/** Other means than those of the images, and what they are weighted with: for refits. */
export interface OtherMeans {
  readonly measured: Float64Array;
  readonly lower: readonly Float64Array[];
  /** What the expectations are off by, in their SDs, in the order of the expectations. */
  readonly expectedOff: Float64Array;
}

/** One search with a covariance that belongs to the start, or with one that is given. */
export function fitOnce(
  annuli: readonly Annuli[],
  uncertainty: Uncertainty,
  start: StentParameters,
  fixed: Partial<StentParameters>,
  other?: OtherMeans,
): RoundFit | undefined {
  const begin = { ...start, ...fixed };
  const lower =
    other?.lower ?? cholesky(annuliCovariance(annuli, stentSpectrum(begin).value, uncertainty));
  if (lower === undefined) return undefined;
  const measured =
    other?.measured ?? Float64Array.from(annuli.flatMap(({ meanHu }) => Array.from(meanHu)));
  const bounds = PARAMETERS.map((name): Bounds => {
    const value = fixed[name];
    const single = name === 'levelHu' && annuli.length < 2 ? 0 : value;
    return single === undefined ? BOUNDS[name] : { low: single, high: single };
  });
  const problem = roundProblem(
    annuli,
    uncertainty.apodisation,
    lower,
    measured,
    other?.expectedOff,
  );
  const fit = levenbergMarquardt(problem, listOf(begin), bounds);
  if (fit === undefined || fit.steps >= MOST_STEPS) return undefined;
  const { residuals } = problem(fit.point);
  const meanSquares = residuals
    .subarray(0, measured.length)
    .reduce((sum, value) => sum + value * value, 0);
  return { ...fit, parameters: parametersOf(fit.point), meanSquares, lower };
}
