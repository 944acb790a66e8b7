/** Samples on either side that a blur uses, for a standard deviation in samples. */
export function blurMargin(sigma: number): number {
  return sigma > 0 ? Math.ceil(3 * sigma) : 0;
}

/**
 * A square of samples blurred by a Gaussian; what the blur needs beyond the square is given with it, so that nothing is
 * made up at its border.
 *
 * @param samples a square with `blurMargin(sigma)` samples more on every side
 * @param size side of the square that is returned
 */
export function blurSamples(samples: Float64Array, size: number, sigma: number): Float64Array {
  const margin = blurMargin(sigma);
  if (margin === 0) return samples;
  const outer = size + 2 * margin;
  const weights = gaussian(margin, sigma);
  const along = new Float64Array(outer * size);
  for (let row = 0; row < outer; row += 1) {
    for (let tap = 0; tap <= 2 * margin; tap += 1) {
      const weight = weights[tap] as number;
      const from = row * outer + tap;
      const to = row * size;
      for (let column = 0; column < size; column += 1) {
        along[to + column] =
          (along[to + column] as number) + weight * (samples[from + column] as number);
      }
    }
  }
  const blurred = new Float64Array(size * size);
  for (let row = 0; row < size; row += 1) {
    for (let tap = 0; tap <= 2 * margin; tap += 1) {
      const weight = weights[tap] as number;
      const from = (row + tap) * size;
      const to = row * size;
      for (let column = 0; column < size; column += 1) {
        blurred[to + column] =
          (blurred[to + column] as number) + weight * (along[from + column] as number);
      }
    }
  }
  return blurred;
}

/** Weights of a Gaussian that sum to 1. */
function gaussian(margin: number, sigma: number): Float64Array {
  const taps = Float64Array.from({ length: 2 * margin + 1 }, (_, index) =>
    Math.exp(-((index - margin) ** 2) / (2 * sigma ** 2)),
  );
  const sum = taps.reduce((total, tap) => total + tap, 0);
  return taps.map((tap) => tap / sum);
}
