import {
  addQuantumNoise,
  backProject,
  filterSinogram,
  type ImageGrid,
  type Kernel,
  type ParallelScan,
  projectSlice,
  type Sinogram,
  seededUniform,
} from '../../../core/phantom/index.js';
import { type ImageStack, imageStack } from './imageStack.js';
import { evidenceScene } from './randomScene.js';

/** How one stack of a pair is made from the acquisition. */
export interface StackRecipe {
  readonly kernel: Kernel;
  readonly grid: ImageGrid;
  /** Heights of its slices. */
  readonly heightsMm: readonly number[];
  /** Thin acquisitions that a slice is the mean of, 0.6 mm apart. */
  readonly layers: number;
}

/** Two reconstructions of one noisy acquisition. */
export interface PairRecipe {
  readonly seed: number;
  readonly scene: number;
  readonly photonsPerRay: number;
  readonly blurSigmaMm: number;
  readonly views: number;
  readonly first: StackRecipe;
  readonly second: StackRecipe;
}

export const LAYER_MM = 0.6;

/** Noiseless line integrals by scene, blur and height. One scene at a time, so that they fit into memory. */
export type ProjectionCache = Map<string, Sinogram>;

/** Makes both stacks. A layer at one height has the same quanta in both. */
export function makePair(
  recipe: PairRecipe,
  cache: ProjectionCache = new Map(),
): readonly [ImageStack, ImageStack] {
  const noisy = new Map<number, Sinogram>();
  const layerAt = (zMm: number): Sinogram => {
    const known = noisy.get(zMm);
    if (known !== undefined) return known;
    const uniform = seededUniform(recipe.seed, Math.round(zMm * 1000));
    const made = addQuantumNoise(projection(recipe, zMm, cache), recipe.photonsPerRay, uniform);
    noisy.set(zMm, made);
    return made;
  };
  const make = (key: string, { kernel, grid, heightsMm, layers }: StackRecipe): ImageStack =>
    imageStack(
      key,
      grid,
      heightsMm.map((zMm) => {
        const heights = Array.from(
          { length: layers },
          (_, layer) => zMm + (layer - (layers - 1) / 2) * LAYER_MM,
        );
        return { zMm, hu: reconstruct(meanOf(heights.map(layerAt)), recipe, kernel, grid) };
      }),
      { thicknessMm: layers * LAYER_MM },
    );
  return [make('first', recipe.first), make('second', recipe.second)];
}

function scanOf({ views, blurSigmaMm }: PairRecipe): ParallelScan {
  return { views, detectors: 1024, pitchMm: 0.35, blurSigmaMm, waterPerMm: 0.02059 };
}

function projection(recipe: PairRecipe, zMm: number, cache: ProjectionCache): Sinogram {
  const key = [recipe.scene, recipe.blurSigmaMm, recipe.views, zMm.toFixed(3)].join();
  const known = cache.get(key);
  if (known !== undefined) return known;
  const made = projectSlice(evidenceScene(recipe.scene, zMm), scanOf(recipe));
  cache.set(key, made);
  return made;
}

function meanOf(sinograms: readonly Sinogram[]): Sinogram {
  const [only] = sinograms;
  if (sinograms.length === 1 && only !== undefined) return only;
  const mean = new Float64Array(only?.length ?? 0);
  for (const sinogram of sinograms)
    sinogram.forEach((value, index) => {
      mean[index] = (mean[index] ?? 0) + value / sinograms.length;
    });
  return mean;
}

function reconstruct(
  sinogram: Sinogram,
  recipe: PairRecipe,
  kernel: Kernel,
  grid: ImageGrid,
): Float64Array {
  const scan = scanOf(recipe);
  const image = backProject(filterSinogram(sinogram, scan, kernel), scan, grid);
  return image.map((attenuation) => (attenuation * 1000) / scan.waterPerMm - 1000);
}
