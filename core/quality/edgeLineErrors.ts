import type { EdgeSamples, FittedEdge } from './fitEdge.js';
import { normalCdf } from './normalCdf.js';

/** Standard errors of what was fitted. */
export interface FitErrors {
  readonly stepHu: number;
  readonly sigmaMm: number;
}

const PARAMETERS = 6;
/** Pixels farther apart than this share no noise, mm; lags are gathered in steps. */
const SHARED_MM = 4;
const LAG_MM = 0.2;

/**
 * Standard errors of a fitted edge under noise whose neighbours are correlated, by propagation through the fit:
 * (JᵀJ)⁻¹·Jᵀ·C·J·(JᵀJ)⁻¹, with the covariance C over the distance of two pixels as their own residuals show it
 * ({@link residualCovariance}). With C of the diagonal alone they would be those for white noise, which CT has not.
 *
 * @returns undefined where the fit does not decide its parameters
 */
export function fitErrors(samples: EdgeSamples, edge: FittedEdge): FitErrors | undefined {
  const { rows, residuals } = jacobian(samples, edge);
  const matrix = productOf(rows);
  const step = solved(matrix, 1);
  const width = solved(matrix, 5);
  if (step === undefined || width === undefined) return undefined;
  const influence = (row: readonly number[]): Float64Array =>
    Float64Array.from(rows, (line) => line.reduce((sum, part, k) => sum + part * (row[k] ?? 0), 0));
  const [ofStep, ofWidth] = [influence(step), influence(width)];
  const covariance = residualCovariance(samples, residuals);
  let [stepVariance, widthVariance] = [0, 0];
  eachPair(samples, (i, j, lag) => {
    const c = (i === j ? 1 : 2) * (covariance[lag] ?? 0);
    stepVariance += c * (ofStep[i] as number) * (ofStep[j] as number);
    widthVariance += c * (ofWidth[i] as number) * (ofWidth[j] as number);
  });
  return {
    stepHu: Math.sqrt(Math.max(0, stepVariance)),
    sigmaMm: Math.sqrt(Math.max(0, widthVariance)),
  };
}

/**
 * Mean product of two residuals by their distance, entry 0 for a pixel with itself, up to where it first falls to
 * zero: the swings behind it are not told apart from chance, and leaving them out makes the errors no smaller.
 */
function residualCovariance(samples: EdgeSamples, residuals: Float64Array): readonly number[] {
  const lags = Math.ceil(SHARED_MM / LAG_MM) + 1;
  const sums = new Float64Array(lags);
  const counts = new Float64Array(lags);
  eachPair(samples, (i, j, lag) => {
    sums[lag] = (sums[lag] as number) + (residuals[i] as number) * (residuals[j] as number);
    counts[lag] = (counts[lag] as number) + 1;
  });
  const n = residuals.length;
  const free = n / (n - PARAMETERS);
  const covariance: number[] = [];
  for (let lag = 0; lag < lags; lag += 1) {
    const count = counts[lag] as number;
    const value = count === 0 ? (covariance.at(-1) ?? 0) : ((sums[lag] as number) / count) * free;
    if (value <= 0) break;
    covariance.push(value);
  }
  return covariance;
}

/** All pairs of pixels that may share noise, each once and each pixel with itself, with the step of their distance. */
function eachPair(
  { acrossMm, alongMm }: EdgeSamples,
  visit: (i: number, j: number, lag: number) => void,
): void {
  const n = acrossMm.length;
  for (let i = 0; i < n; i += 1) {
    const [t, s] = [acrossMm[i] as number, alongMm[i] as number];
    visit(i, i, 0);
    for (let j = i + 1; j < n; j += 1) {
      const dt = (acrossMm[j] as number) - t;
      const ds = (alongMm[j] as number) - s;
      const square = dt * dt + ds * ds;
      if (square < SHARED_MM * SHARED_MM) visit(i, j, 1 + Math.floor(Math.sqrt(square) / LAG_MM));
    }
  }
}

/** Derivatives by low, step, offset, slope, curvature and σ, and what is left of the values. */
function jacobian(
  { acrossMm, alongMm, hu }: EdgeSamples,
  { lowHu, stepHu, offsetMm, slope, curvaturePerMm, sigmaMm }: FittedEdge,
): { readonly rows: readonly (readonly number[])[]; readonly residuals: Float64Array } {
  const residuals = new Float64Array(hu.length);
  const rows = Array.from(hu, (value, index) => {
    const s = alongMm[index] as number;
    const t = (acrossMm[index] as number) - offsetMm - slope * s - curvaturePerMm * s * s;
    const z = t / sigmaMm;
    const gaussian = Math.exp(-0.5 * z * z);
    const rise = normalCdf(z, gaussian);
    const steep = -(stepHu * gaussian) / (sigmaMm * Math.sqrt(2 * Math.PI));
    residuals[index] = value - lowHu - stepHu * rise;
    return [1, rise, steep, steep * s, steep * s * s, steep * z];
  });
  return { rows, residuals };
}

function productOf(rows: readonly (readonly number[])[]): readonly (readonly number[])[] {
  const sums = Array.from({ length: PARAMETERS }, () => new Array<number>(PARAMETERS).fill(0));
  for (const row of rows)
    sums.forEach((line, a) => {
      for (let b = 0; b < PARAMETERS; b += 1)
        line[b] = (line[b] ?? 0) + (row[a] ?? 0) * (row[b] ?? 0);
    });
  return sums;
}

/** Row `wanted` of the inverse of a symmetric matrix, by elimination with pivots; undefined where it has none. */
function solved(
  matrix: readonly (readonly number[])[],
  wanted: number,
): readonly number[] | undefined {
  const size = matrix.length;
  const work = matrix.map((line, row) => [...line, row === wanted ? 1 : 0]);
  for (let column = 0; column < size; column += 1) {
    let pivot = column;
    for (let row = column + 1; row < size; row += 1)
      if (Math.abs(work[row]?.[column] ?? 0) > Math.abs(work[pivot]?.[column] ?? 0)) pivot = row;
    const line = work[pivot];
    const other = work[column];
    if (line === undefined || other === undefined) return undefined;
    const head = line[column] ?? 0;
    if (!(Math.abs(head) > 1e-12 * Math.abs(matrix[column]?.[column] ?? 0))) return undefined;
    work[pivot] = other;
    work[column] = line.map((value) => value / head);
    work.forEach((row, index) => {
      const by = row[column] ?? 0;
      if (index === column || by === 0) return;
      work[index] = row.map((value, k) => value - by * (work[column]?.[k] ?? 0));
    });
  }
  return work.map((line) => line[size] ?? 0);
}
