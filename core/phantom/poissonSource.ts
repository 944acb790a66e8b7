import { normalSource } from './normalSource.js';
import type { UniformSource } from './uniformSource.js';

/** From here on the normal distribution stands in: the skewness that it leaves out is 1/√mean, below 2.3 %. */
const NORMAL_FROM = 2000;
/** Below this the product of uniform numbers is quick enough; above it the rejection method is valid (mean ≥ 10). */
const REJECTION_FROM = 12;

/**
 * A source of Poisson counts of a given mean. Exact below a mean of 2000: products of uniform numbers (Knuth, The
 * Art of Computer Programming 2, 3.4.1) for small means, transformed rejection PTRS (Hörmann 1993,
 * doi 10.1016/0167-6687(93)90997-4; constants from memory) for larger ones. Throws for a negative mean or none.
 */
export function poissonSource(uniform: UniformSource): (mean: number) => number {
  const normal = normalSource(uniform);
  return (mean) => {
    if (!(mean >= 0)) throw new RangeError(`invalid mean count: ${mean}`);
    if (mean >= NORMAL_FROM) return Math.max(0, Math.round(mean + Math.sqrt(mean) * normal()));
    return mean >= REJECTION_FROM ? byRejection(mean, uniform) : byProduct(mean, uniform);
  };
}

function byProduct(mean: number, uniform: UniformSource): number {
  const limit = Math.exp(-mean);
  let count = -1;
  let product = 1;
  do {
    count += 1;
    product *= uniform();
  } while (product > limit);
  return count;
}

function byRejection(mean: number, uniform: UniformSource): number {
  const b = 0.931 + 2.53 * Math.sqrt(mean);
  const a = -0.059 + 0.02483 * b;
  const inverseAlpha = 1.1239 + 1.1328 / (b - 3.4);
  const quickly = 0.9277 - 3.6224 / (b - 2);
  for (;;) {
    const u = uniform() - 0.5;
    const v = uniform();
    const edge = 0.5 - Math.abs(u);
    const count = Math.floor(((2 * a) / edge + b) * u + mean + 0.43);
    if (edge >= 0.07 && v <= quickly) return count;
    if (count < 0 || (edge < 0.013 && v > edge)) continue;
    const drawn = Math.log((v * inverseAlpha) / (a / (edge * edge) + b));
    if (drawn <= count * Math.log(mean) - mean - logFactorial(count)) return count;
  }
}

/** ln n!, by Stirling's series from 10 on (error below 1e-9). */
function logFactorial(n: number): number {
  if (n < 10) {
    let product = 1;
    for (let factor = 2; factor <= n; factor += 1) product *= factor;
    return Math.log(product);
  }
  const series = 1 / (12 * n) - 1 / (360 * n ** 3) + 1 / (1260 * n ** 5);
  return n * Math.log(n) - n + 0.5 * Math.log(2 * Math.PI * n) + series;
}
