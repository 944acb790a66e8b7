/**
 * Frequencies at which everything is summed, per mm: midpoints of equal steps. Sums over them stand for integrals
 * over the plane, ∫ g(f)·2πf df, for functions that end within 1/(2·step) = 25 mm.
 */
export const STEP_PER_MM = 0.02;
export const FREQUENCIES: Float64Array = Float64Array.from(
  { length: 80 },
  (_, index) => (index + 0.5) * STEP_PER_MM,
);
/** 2πf df of each. */
export const RING_AREAS: Float64Array = FREQUENCIES.map((f) => 2 * Math.PI * f * STEP_PER_MM);
