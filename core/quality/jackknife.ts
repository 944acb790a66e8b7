/** A value with its standard error. */
export interface Estimate {
  readonly value: number;
  readonly standardError: number;
}

/**
 * A statistic of `count` samples with its jackknife standard error √((n − 1)/n · Σ(θᵢ − θ̄)²), θᵢ without sample i
 * (Efron & Stein 1981, doi 10.1214/aos/1176345462). `statistic(-1)` is taken over all. Undefined for fewer than two
 * samples, or where the statistic has no value.
 */
export function jackknife(
  count: number,
  statistic: (leftOut: number) => number | undefined,
): Estimate | undefined {
  const value = statistic(-1);
  if (count < 2 || value === undefined || !Number.isFinite(value)) return undefined;
  const parts: number[] = [];
  for (let index = 0; index < count; index += 1) {
    const part = statistic(index);
    if (part === undefined || !Number.isFinite(part)) return undefined;
    parts.push(part);
  }
  const mean = parts.reduce((sum, part) => sum + part, 0) / count;
  const squares = parts.reduce((sum, part) => sum + (part - mean) ** 2, 0);
  return { value, standardError: Math.sqrt(((count - 1) / count) * squares) };
}
