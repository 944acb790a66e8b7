import { FREQUENCIES, STEP_PER_MM } from './frequencies.js';

/** Places from the edge, mm. */
const PLACE_MM = 0.04;
const PLACES = 60;

let waves: readonly Float64Array[] | undefined;

/**
 * 10–90 % distance of a straight edge behind a kernel of response W and a Gaussian blur, mm: the edge is
 * ½ + ∫ W(f)·exp(−2π²σ²f²)·sin(2πfx)/(πf) df, and runs alike on both sides. 4.8 mm where it doesn't rise so far.
 */
export function edgeRiseMm(response: Float64Array, blurSigmaMm: number): number {
  waves ??= Array.from({ length: PLACES }, (_, place) =>
    FREQUENCIES.map(
      (f) => (Math.sin(2 * Math.PI * f * (place + 1) * PLACE_MM) / (Math.PI * f)) * STEP_PER_MM,
    ),
  );
  const blurred = response.map(
    (w, index) => w * Math.exp(-2 * (Math.PI * (FREQUENCIES[index] as number) * blurSigmaMm) ** 2),
  );
  let before = 0;
  for (const [place, wave] of waves.entries()) {
    let height = 0;
    for (let f = 0; f < wave.length; f += 1) height += (wave[f] as number) * (blurred[f] as number);
    if (height >= 0.4) return 2 * PLACE_MM * (place + (0.4 - before) / (height - before));
    before = height;
  }
  return 2 * PLACE_MM * PLACES;
}
