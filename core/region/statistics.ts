/** Plain statistics of values. Undefined is the answer where there is none: no mean of nothing, no SD of one. */
export interface Statistics {
  readonly n: number;
  readonly mean: number | undefined;
  /** Sample standard deviation, n − 1. */
  readonly sd: number | undefined;
  readonly min: number | undefined;
  readonly max: number | undefined;
  /** Mean of the two middle values for an even count (Hyndman and Fan 1996, all sample medians agree). */
  readonly median: number | undefined;
}

/**
 * Mean and sample SD in two passes with the correction of Chan, Golub and LeVeque (1983), which keeps the
 * digits that Σx² − n·mean² would lose.
 */
export function statistics(values: ArrayLike<number>): Statistics {
  const n = values.length;
  if (n === 0) {
    return {
      n,
      mean: undefined,
      sd: undefined,
      min: undefined,
      max: undefined,
      median: undefined,
    };
  }
  const sorted = Float64Array.from(values).sort();
  const mean = meanOf(sorted);
  return {
    n,
    mean,
    sd: n > 1 ? Math.sqrt(varianceOf(sorted, mean)) : undefined,
    min: sorted[0],
    max: sorted[n - 1],
    median: ((sorted[(n - 1) >> 1] ?? 0) + (sorted[n >> 1] ?? 0)) / 2,
  };
}

/** Mean by a shifted, compensated sum (Neumaier 1974). */
function meanOf(values: Float64Array): number {
  const shift = values[values.length >> 1] ?? 0;
  let sum = 0;
  let lost = 0;
  for (const value of values) {
    const x = value - shift;
    const next = sum + x;
    lost += Math.abs(sum) >= Math.abs(x) ? sum - next + x : x - next + sum;
    sum = next;
  }
  return shift + (sum + lost) / values.length;
}

function varianceOf(values: Float64Array, mean: number): number {
  let squares = 0;
  let drift = 0;
  for (const value of values) {
    const x = value - mean;
    squares += x * x;
    drift += x;
  }
  return (squares - (drift * drift) / values.length) / (values.length - 1);
}
