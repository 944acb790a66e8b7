import { backwardSolve, cholesky, forwardSolve, inverseSymmetric } from './linear.js';

/** What a model says at a point: residuals of unit variance, and their derivatives, parameter after parameter. */
export interface Linearised {
  readonly residuals: Float64Array;
  readonly slopes: readonly Float64Array[];
}

export interface Bounds {
  readonly low: number;
  readonly high: number;
}

/** Where the sum of squares is least. */
export interface LeastSquares {
  readonly point: Float64Array;
  readonly squares: number;
  /** (JᵀJ)⁻¹ there. */
  readonly covariance: readonly Float64Array[];
  readonly steps: number;
}

/** Where a search that has not come to an end is left. */
export const MOST_STEPS = 60;
/** A step that gains less than this ends the search: far below what one standard error makes, 1. */
const LEAST_GAIN = 1e-4;

/**
 * Least squares by the method of Levenberg 1944 and Marquardt 1963 (doi 10.1137/0111030) with analytic derivatives; steps are cut
 * at the bounds. Parameters whose bounds are equal stay as they are.
 *
 * @returns undefined where the equations can't be solved; a search that has not ended after {@link MOST_STEPS} says so
 *   by its number of steps
 */
export function levenbergMarquardt(
  model: (point: Float64Array) => Linearised,
  start: Float64Array,
  bounds: readonly Bounds[],
): LeastSquares | undefined {
  let point = clamped(start, bounds);
  let here = model(point);
  let squares = sumOfSquares(here.residuals);
  let damping = 1e-3;
  for (let step = 1; step <= MOST_STEPS; step += 1) {
    const free = freeParameters(point, here, bounds);
    const change = stepOf(here, free, damping);
    if (change === undefined) return undefined;
    const tried = clamped(
      point.map((value, k) => value + (change[k] as number)),
      bounds,
    );
    const next = model(tried);
    const nextSquares = sumOfSquares(next.residuals);
    if (!(nextSquares <= squares)) {
      damping *= 8;
      if (damping > 1e7) return finished(point, here, squares, bounds, step);
      continue;
    }
    const gain = squares - nextSquares;
    [point, here, squares] = [tried, next, nextSquares];
    damping = Math.max(1e-9, damping / 8);
    if (gain < LEAST_GAIN && damping < 1) return finished(point, here, squares, bounds, step);
  }
  return finished(point, here, squares, bounds, MOST_STEPS);
}

function finished(
  point: Float64Array,
  { slopes }: Linearised,
  squares: number,
  bounds: readonly Bounds[],
  steps: number,
): LeastSquares | undefined {
  const fixed = bounds.map(({ low, high }, k) => {
    const slope = slopes[k] as Float64Array;
    return low === high || dot(slope, slope) === 0;
  });
  const matrix = slopes.map((a, i) =>
    Float64Array.from(slopes, (b, j) => (fixed[i] || fixed[j] ? (i === j ? 1e12 : 0) : dot(a, b))),
  );
  const covariance = inverseSymmetric(matrix);
  return covariance === undefined ? undefined : { point, squares, covariance, steps };
}

/** Parameters that may move: neither fixed, nor on a bound that the slope pushes against. */
function freeParameters(
  point: Float64Array,
  { residuals, slopes }: Linearised,
  bounds: readonly Bounds[],
): readonly number[] {
  return bounds.flatMap(({ low, high }, k) => {
    if (low === high) return [];
    const slope = slopes[k] as Float64Array;
    // What changes nothing here can't be sought.
    if (dot(slope, slope) === 0) return [];
    const downhill = -dot(slope, residuals);
    const value = point[k] as number;
    return (value <= low && downhill < 0) || (value >= high && downhill > 0) ? [] : [k];
  });
}

/** −(JᵀJ + λ·diag JᵀJ)⁻¹·Jᵀr over the free parameters, 0 for the others. */
function stepOf(
  { residuals, slopes }: Linearised,
  free: readonly number[],
  damping: number,
): Float64Array | undefined {
  const used = free.map((k) => slopes[k] as Float64Array);
  const matrix = used.map((a, i) =>
    Float64Array.from(used, (b, j) => dot(a, b) * (i === j ? 1 + damping : 1)),
  );
  const lower = cholesky(matrix);
  if (lower === undefined) return undefined;
  const solved = backwardSolve(
    lower,
    forwardSolve(
      lower,
      Float64Array.from(used, (a) => -dot(a, residuals)),
    ),
  );
  const change = new Float64Array(slopes.length);
  free.forEach((k, index) => {
    change[k] = solved[index] as number;
  });
  return change;
}

function clamped(point: Float64Array, bounds: readonly Bounds[]): Float64Array {
  return point.map((value, k) => {
    const { low, high } = bounds[k] as Bounds;
    return Math.min(high, Math.max(low, value));
  });
}

function sumOfSquares(values: Float64Array): number {
  return dot(values, values);
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let index = 0; index < a.length; index += 1)
    sum += (a[index] as number) * (b[index] as number);
  return sum;
}
