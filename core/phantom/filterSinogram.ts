import { makeFft } from '../quality/fft.js';
import type { Kernel } from './kernel.js';
import { kernelResponse, paddedSize } from './kernelResponse.js';
import type { ParallelScan, Sinogram } from './parallelScan.js';

/**
 * Each view filtered with the kernel, per mm: q = τ·(p ∗ h). Two views travel through one complex transform, one
 * as its real and one as its imaginary part: the response is real and even, so they stay apart.
 */
export function filterSinogram(sinogram: Sinogram, scan: ParallelScan, kernel: Kernel): Sinogram {
  const { views, detectors, pitchMm } = scan;
  const size = paddedSize(detectors);
  const fft = makeFft(size);
  const response = kernelResponse(kernel, pitchMm, size);
  const filtered = new Float64Array(sinogram.length);
  const re = new Float64Array(size);
  const im = new Float64Array(size);
  for (let view = 0; view < views; view += 2) {
    const first = view * detectors;
    const second = first + detectors;
    re.fill(0);
    im.fill(0);
    re.set(sinogram.subarray(first, second));
    if (view + 1 < views) im.set(sinogram.subarray(second, second + detectors));
    fft.forward(re, im);
    for (let k = 0; k < size; k += 1) {
      const factor = response[k] ?? 0;
      re[k] = (re[k] ?? 0) * factor;
      im[k] = (im[k] ?? 0) * factor;
    }
    fft.inverse(re, im);
    filtered.set(re.subarray(0, detectors), first);
    if (view + 1 < views) filtered.set(im.subarray(0, detectors), second);
  }
  return filtered;
}
