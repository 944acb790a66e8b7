import type { Kernel } from './kernel.js';
import { kernelTaps, paddedSize } from './kernelResponse.js';
import { detectorMm, type ParallelScan, type Sinogram, viewAngleRad } from './parallelScan.js';

/**
 * The SD in HU that quantum noise has at one place of the image: the variances e^p/I₀ of the rays through it, through
 * the kernel's taps, the linear interpolation and the sum over views. The rays' variance is taken as constant over
 * the width of the kernel. Needs the noiseless sinogram.
 */
export function expectedNoiseHu(
  sinogram: Sinogram,
  scan: ParallelScan,
  kernel: Kernel,
  photonsPerRay: number,
  placeMm: readonly [number, number],
): number {
  const { views, detectors, pitchMm, waterPerMm } = scan;
  const [own, neighbour] = tapCovariance(kernel, scan);
  let sum = 0;
  for (let view = 0; view < views; view += 1) {
    const theta = viewAngleRad(scan, view);
    const t = placeMm[0] * Math.cos(theta) + placeMm[1] * Math.sin(theta);
    const place = (t - detectorMm(scan, 0)) / pitchMm;
    const left = Math.floor(place);
    const part = place - left;
    const p = sinogram[view * detectors + left] ?? 0;
    const interpolated = (1 - 2 * part + 2 * part * part) * own + 2 * part * (1 - part) * neighbour;
    sum += (Math.exp(p) / photonsPerRay) * interpolated;
  }
  return ((Math.PI / views) * Math.sqrt(sum) * 1000) / waterPerMm;
}

/** τ²Σh(n)² and τ²Σh(n)h(n + 1): variance of a filtered detector, and covariance with the next, for white noise. */
function tapCovariance(kernel: Kernel, scan: ParallelScan): readonly [number, number] {
  const taps = kernelTaps(kernel, scan.pitchMm, paddedSize(scan.detectors));
  let own = 0;
  let neighbour = 0;
  taps.forEach((tap, n) => {
    own += tap * tap;
    neighbour += tap * (taps[(n + 1) % taps.length] ?? 0);
  });
  return [own * scan.pitchMm ** 2, neighbour * scan.pitchMm ** 2];
}
