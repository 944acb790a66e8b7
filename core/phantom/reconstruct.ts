import { backProject } from './backProject.js';
import { backProjectPair } from './backProjectPair.js';
import { filterSinogram } from './filterSinogram.js';
import type { ImageGrid } from './imageGrid.js';
import type { Kernel } from './kernel.js';
import type { ParallelScan, Sinogram } from './parallelScan.js';
import { AIR_HU } from './scene.js';

/** Filtered back projection into a grid, as HU = 1000·(μ − μ_water)/μ_water, row after row. */
export function reconstructHu(
  sinogram: Sinogram,
  scan: ParallelScan,
  kernel: Kernel,
  grid: ImageGrid,
): Float64Array {
  return asHu(backProject(filterSinogram(sinogram, scan, kernel), scan, grid), scan);
}

/** The same for two kernels at once, which is quicker than one after the other. */
export function reconstructPairHu(
  sinogram: Sinogram,
  scan: ParallelScan,
  kernels: readonly [Kernel, Kernel],
  grid: ImageGrid,
): readonly [Float64Array, Float64Array] {
  const [first, second] = backProjectPair(
    filterSinogram(sinogram, scan, kernels[0]),
    filterSinogram(sinogram, scan, kernels[1]),
    scan,
    grid,
  );
  return [asHu(first, scan), asHu(second, scan)];
}

function asHu(image: Float64Array, scan: ParallelScan): Float64Array {
  const scale = 1000 / scan.waterPerMm;
  return image.map((attenuation) => attenuation * scale + AIR_HU);
}
