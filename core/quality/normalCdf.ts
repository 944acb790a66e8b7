/**
 * Φ(z), the standard normal distribution, by the rational form of Abramowitz & Stegun 1964, 7.1.26: wrong by less
 * than 1e-7 everywhere. `gaussian`, exp(−z²/2), may be given where it is known already.
 */
export function normalCdf(z: number, gaussian = Math.exp(-0.5 * z * z)): number {
  const t = 1 / (1 + 0.3275911 * Math.abs(z) * Math.SQRT1_2);
  const series =
    t *
    (0.254829592 + t * (-0.284496736 + t * (1.421413741 + t * (-1.453152027 + t * 1.061405429))));
  const half = 0.5 * series * gaussian;
  return z < 0 ? half : 1 - half;
}
