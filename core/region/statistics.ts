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
  const own = Float64Array.from(values);
  const mean = meanOf(own);
  let [min, max] = [Infinity, -Infinity];
  for (const value of own) {
    if (value < min) min = value;
    if (value > max) max = value;
  }
  return {
    n,
    mean,
    sd: n > 1 ? Math.sqrt(varianceOf(own, mean)) : undefined,
    min,
    max,
    median: medianOf(own),
  };
}

/** The median; the values come out in another order. */
function medianOf(values: Float64Array): number {
  const upper = values.length >> 1;
  const high = selected(values, upper);
  if (values.length % 2 === 1) return high;
  // All values before the selected place are no greater: the other middle one is the greatest of them.
  let low = -Infinity;
  for (let index = 0; index < upper; index += 1) low = Math.max(low, values[index] as number);
  return (low + high) / 2;
}

/** The value that sorting would put at a place, by selection (Hoare 1961, doi 10.1145/366622.366647). */
function selected(values: Float64Array, place: number): number {
  let [left, right] = [0, values.length - 1];
  while (left < right) {
    const pivot = values[(left + right) >> 1] as number;
    let [up, down] = [left, right];
    while (up <= down) {
      while ((values[up] as number) < pivot) up += 1;
      while ((values[down] as number) > pivot) down -= 1;
      if (up > down) break;
      const kept = values[up] as number;
      values[up] = values[down] as number;
      values[down] = kept;
      up += 1;
      down -= 1;
    }
    if (place <= down) right = down;
    else if (place >= up) left = up;
    else break;
  }
  return values[place] as number;
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
