/** Values of two Bessel functions of the first kind at one place. */
export interface BesselPair {
  readonly j0: number;
  readonly j1: number;
}

/**
 * J₀(x) and J₁(x) for x ≥ 0, from the polynomials of Abramowitz & Stegun 1964, 9.4.1, 9.4.3, 9.4.4 and 9.4.6:
 * errors below 5·10⁻⁸ for x up to 3, below 2·10⁻⁷ beyond.
 */
export function besselPair(x: number): BesselPair {
  return x <= 3 ? small(x) : large(x);
}

const J0_SMALL = [1, -2.2499997, 1.2656208, -0.3163866, 0.0444479, -0.0039444, 0.00021];
const J1_SMALL = [0.5, -0.56249985, 0.21093573, -0.03954289, 0.00443319, -0.00031761, 0.00001109];

function small(x: number): BesselPair {
  const square = (x / 3) ** 2;
  return { j0: polynomial(J0_SMALL, square), j1: x * polynomial(J1_SMALL, square) };
}

const F0 = [0.79788456, -0.00000077, -0.0055274, -0.00009512, 0.00137237, -0.00072805, 0.00014476];
const PHASE0 = [
  -0.78539816, -0.04166397, -0.00003954, 0.00262573, -0.00054125, -0.00029333, 0.00013558,
];
const F1 = [0.79788456, 0.00000156, 0.01659667, 0.00017105, -0.00249511, 0.00113653, -0.00020033];
const PHASE1 = [
  -2.35619449, 0.12499612, 0.0000565, -0.00637879, 0.00074348, 0.00079824, -0.00029166,
];

function large(x: number): BesselPair {
  const t = 3 / x;
  const root = Math.sqrt(x);
  return {
    j0: (polynomial(F0, t) * Math.cos(x + polynomial(PHASE0, t))) / root,
    j1: (polynomial(F1, t) * Math.cos(x + polynomial(PHASE1, t))) / root,
  };
}

/** Coefficients from the constant upwards (Horner's scheme). */
function polynomial(coefficients: readonly number[], t: number): number {
  return coefficients.reduceRight((sum, coefficient) => sum * t + coefficient, 0);
}
