import { makeFft } from '../quality/fft.js';
import { apodisation, type Kernel } from './kernel.js';

/**
 * Frequency response of a kernel over `size` detectors, in the order of the discrete transform, per mm. The ramp is
 * the transform of its band-limited taps h(0) = 1/4τ², h(odd) = −1/(nπτ)² (Kak & Slaney 1988 eq. 61), which keeps
 * the mean of the image right where |f| sampled at f = 0 would lose it.
 */
export function kernelResponse(kernel: Kernel, pitchMm: number, size: number): Float64Array {
  const response = new Float64Array(size);
  const nothing = new Float64Array(size);
  response[0] = 1 / (4 * pitchMm * pitchMm);
  for (let n = 1; n <= size / 2; n += 2) {
    const tap = -1 / (Math.PI * n * pitchMm) ** 2;
    response[n] = tap;
    response[size - n] = tap;
  }
  makeFft(size).forward(response, nothing);
  return response.map((value, k) => {
    const frequency = Math.min(k, size - k) / (size * pitchMm);
    return value * pitchMm * apodisation(kernel, frequency);
  });
}

/** Taps of a kernel, per mm²: what one detector of value 1 becomes, divided by the pitch. Index 0 is its own place. */
export function kernelTaps(kernel: Kernel, pitchMm: number, size: number): Float64Array {
  const re = kernelResponse(kernel, pitchMm, size);
  makeFft(size).inverse(re, new Float64Array(size));
  return re.map((value) => value / pitchMm);
}

/** A power of two that leaves room for a row and as many zeros: no end of a row reaches round to the other. */
export function paddedSize(detectors: number): number {
  return 2 ** Math.ceil(Math.log2(2 * detectors));
}
