import { backProject } from './backProject.js';
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
  const image = backProject(filterSinogram(sinogram, scan, kernel), scan, grid);
  const scale = 1000 / scan.waterPerMm;
  return image.map((attenuation) => attenuation * scale + AIR_HU);
}
