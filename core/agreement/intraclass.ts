import type { Estimate } from './blandAltman.js';
import { fQuantile } from './studentT.js';

/** Intraclass correlation coefficients of one reading each, with 95 % confidence intervals. */
export interface IntraclassCorrelation {
  /** ICC(1,1): each subject read by other readers. */
  readonly oneWay: Estimate;
  /** ICC(2,1): the readers are a sample of readers; absolute agreement. */
  readonly twoWayAgreement: Estimate;
  /** ICC(3,1): these readers alone; consistency. */
  readonly twoWayConsistency: Estimate;
}

interface MeanSquares {
  readonly n: number;
  readonly k: number;
  readonly between: number;
  readonly within: number;
  readonly readers: number;
  readonly error: number;
}

/**
 * Shrout and Fleiss (Psychological Bulletin 1979; 86: 420–428): ICC(1,1), ICC(2,1), ICC(3,1) and their intervals.
 *
 * @param ratings a row a subject, a column a reader; no gaps
 * @returns undefined for fewer than two subjects or readers, or when nothing varies
 */
export function intraclass(
  ratings: readonly (readonly number[])[],
): IntraclassCorrelation | undefined {
  const squares = meanSquares(ratings);
  if (squares === undefined) return undefined;
  const { n, k, between, within, readers, error } = squares;
  if (between + within === 0) return undefined;
  const oneWay = (between - within) / (between + (k - 1) * within);
  const consistency = (between - error) / (between + (k - 1) * error);
  const agreement = (between - error) / (between + (k - 1) * error + (k * (readers - error)) / n);
  return {
    oneWay: { value: oneWay, ...ratioInterval(between / within, n - 1, n * (k - 1), k) },
    twoWayConsistency: {
      value: consistency,
      ...ratioInterval(between / error, n - 1, (n - 1) * (k - 1), k),
    },
    twoWayAgreement: { value: agreement, ...agreementInterval(squares, agreement) },
  };
}

function meanSquares(ratings: readonly (readonly number[])[]): MeanSquares | undefined {
  const n = ratings.length;
  const k = ratings[0]?.length ?? 0;
  if (n < 2 || k < 2) return undefined;
  if (ratings.some((row) => row.length !== k)) throw new RangeError('ratings with gaps');
  const sum = (values: readonly number[]): number =>
    values.reduce((total, value) => total + value, 0);
  const grand = sum(ratings.map(sum)) / (n * k);
  const rowMeans = ratings.map((row) => sum(row) / k);
  const columnMeans = Array.from(
    { length: k },
    (_, j) => sum(ratings.map((row) => row[j] ?? 0)) / n,
  );
  const total = sum(ratings.map((row) => sum(row.map((value) => (value - grand) ** 2))));
  const rows = k * sum(rowMeans.map((mean) => (mean - grand) ** 2));
  const columns = n * sum(columnMeans.map((mean) => (mean - grand) ** 2));
  return {
    n,
    k,
    between: rows / (n - 1),
    within: (total - rows) / (n * (k - 1)),
    readers: columns / (k - 1),
    error: (total - rows - columns) / ((n - 1) * (k - 1)),
  };
}

/** Interval of (F − 1) / (F + k − 1) from the interval of F. */
function ratioInterval(
  f: number,
  upper: number,
  lower: number,
  k: number,
): { low: number; high: number } {
  const fLow = f / fQuantile(0.975, upper, lower);
  const fHigh = f * fQuantile(0.975, lower, upper);
  return { low: (fLow - 1) / (fLow + k - 1), high: (fHigh - 1) / (fHigh + k - 1) };
}

/** Interval of ICC(2,1) with Satterthwaite's degrees of freedom, as Shrout and Fleiss give it. */
function agreementInterval(
  { n, k, between, readers, error }: MeanSquares,
  icc: number,
): { low: number; high: number } {
  const ratio = readers / error;
  const a = k * icc * ratio + n * (1 + (k - 1) * icc) - k * icc;
  const degrees =
    ((k - 1) * (n - 1) * a * a) /
    ((n - 1) * k * k * icc * icc * ratio * ratio + (n * (1 + (k - 1) * icc) - k * icc) ** 2);
  const fUpper = fQuantile(0.975, n - 1, degrees);
  const fLower = fQuantile(0.975, degrees, n - 1);
  const spread = k * readers + (k * n - k - n) * error;
  return {
    low: (n * (between - fUpper * error)) / (fUpper * spread + n * between),
    high: (n * (fLower * between - error)) / (spread + n * fLower * between),
  };
}
