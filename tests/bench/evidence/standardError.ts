import type { Kernel as Side } from '../../../core/note/index.js';
import { measureSharpness } from '../../../core/pairing/sharpness.js';
import {
  addQuantumNoise,
  type ImageGrid,
  type Kernel,
  type ParallelScan,
  projectSlice,
  reconstructPairHu,
  type Sinogram,
  seededUniform,
  type UniformSource,
} from '../../../core/phantom/index.js';
import type { KernelTexture } from '../../../core/quality/index.js';
import { measureRegion, type Shape } from '../../../core/region/index.js';
import { type ImageStack, imageStack, readFrom } from './imageStack.js';
import { evidenceScene } from './randomScene.js';

/** Phantoms on which the standard error is put to the test. */
export interface CoverageRecipe {
  readonly scene: number;
  readonly photonsPerRay: number;
  readonly kernels: Readonly<Record<Side, Kernel>>;
  readonly grid: ImageGrid;
  readonly views: number;
  /** Scans with quantum noise of their own, and placements on each. */
  readonly scans: number;
  readonly placements: number;
}

/** How often the truth lay within 1.96 standard errors, of how many; by the stated one and by SD/√n. */
export interface Coverage {
  readonly placements: number;
  readonly stated: number;
  readonly naive: number;
  /** Root mean square of (mean − truth) / standard error: 1 where the standard error is right. */
  readonly ratio: number;
}

export const SIDES: readonly Side[] = ['soft', 'sharp'];

const HEIGHTS_MM = [2, 7, 12, 17, 21] as const;
/** Height of the slice on which regions are placed. */
const PLACED_MM = 12;
/** Half width of the square in which they are placed, mm. */
const REACH_MM = 40;

/**
 * Measures the textures as the program does, on a pair of noisy stacks; then places random ellipses on other noisy
 * scans of the same phantom and counts how often the mean without noise, of the very same pixels, lies within 1.96
 * standard errors of the mean with noise.
 *
 * @returns all regions, and by the mean radius: below 1.2 mm, below 2.5 mm, below 5 mm, larger
 */
export async function coverageOf(
  recipe: CoverageRecipe,
): Promise<Readonly<Record<Side, readonly Coverage[]>>> {
  const scan: ParallelScan = {
    views: recipe.views,
    detectors: 1024,
    pitchMm: 0.35,
    blurSigmaMm: 0.18,
    waterPerMm: 0.02059,
  };
  const textures = await texturesOf(recipe, scan);
  const clean = projectSlice(evidenceScene(recipe.scene, PLACED_MM), scan);
  const truth = stacksOf(recipe, scan, [{ zMm: PLACED_MM, sinogram: clean }]);
  const tallies = { soft: GROUPS.map(() => new Tally()), sharp: GROUPS.map(() => new Tally()) };
  for (let number = 0; number < recipe.scans; number += 1) {
    const noisy = addQuantumNoise(
      clean,
      recipe.photonsPerRay,
      seededUniform(recipe.scene, 2, number),
    );
    const stacks = stacksOf(recipe, scan, [{ zMm: PLACED_MM, sinogram: noisy }]);
    const uniform = seededUniform(recipe.scene, 3, number);
    for (let placed = 0; placed < recipe.placements; placed += 1) {
      const shape = randomEllipse(uniform, recipe.grid);
      for (const side of SIDES) {
        const value = measured(shape, stacks[side], textures[side]);
        const { meanHu } = measured(shape, truth[side], textures[side]);
        if (value.meanHu === null || meanHu === null) continue;
        const apart = value.meanHu - meanHu;
        const naive = value.sdHu === null ? null : value.sdHu / Math.sqrt(value.n);
        const radius = Math.sqrt(shape.radiiMm[0] * shape.radiiMm[1]);
        GROUPS.forEach(([least, most], group) => {
          if (radius >= least && radius < most)
            tallies[side][group]?.add(apart, value.standardErrorHu, naive);
        });
      }
    }
  }
  return {
    soft: tallies.soft.map((tally) => tally.coverage()),
    sharp: tallies.sharp.map((tally) => tally.coverage()),
  };
}

/** Mean radii of the groups, from and below, mm; the first holds all. */
export const GROUPS = [
  [0, Infinity],
  [0, 1.2],
  [1.2, 2.5],
  [2.5, 5],
  [5, Infinity],
] as const;

function measured(shape: Shape, { stack, stored }: ImageStack, texture: KernelTexture) {
  return measureRegion(shape, stack, (index) => stored[index], texture);
}

async function texturesOf(
  recipe: CoverageRecipe,
  scan: ParallelScan,
): Promise<Readonly<Record<Side, KernelTexture>>> {
  const { soft, sharp } = stacksOf(
    recipe,
    scan,
    HEIGHTS_MM.map((zMm, index) => ({
      zMm,
      sinogram: addQuantumNoise(
        projectSlice(evidenceScene(recipe.scene, zMm), scan),
        recipe.photonsPerRay,
        seededUniform(recipe.scene, 1, index),
      ),
    })),
  );
  const found = await measureSharpness(soft.stack, sharp.stack, readFrom(soft, sharp));
  if (found.textures === undefined) throw new RangeError(`nothing measured: ${found.text}`);
  return { soft: found.textures.first, sharp: found.textures.second };
}

function stacksOf(
  { kernels, grid }: CoverageRecipe,
  scan: ParallelScan,
  slices: readonly { readonly zMm: number; readonly sinogram: Sinogram }[],
): Readonly<Record<Side, ImageStack>> {
  const images = slices.map(({ zMm, sinogram }) => {
    const [soft, sharp] = reconstructPairHu(sinogram, scan, [kernels.soft, kernels.sharp], grid);
    return { zMm, soft, sharp };
  });
  const stack = (side: Side): ImageStack =>
    imageStack(
      side,
      grid,
      images.map((image) => ({ zMm: image.zMm, hu: image[side] })),
    );
  return { soft: stack('soft'), sharp: stack('sharp') };
}

/** Ellipses from 0.5 mm of half axis to 8.5 mm, small ones more often, lying and leaning anywhere. */
function randomEllipse(uniform: UniformSource, { centreMm: [x, y] }: ImageGrid) {
  const radius = 0.5 + 8 * uniform() * uniform();
  const angle = Math.PI * uniform();
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const away = (): number => REACH_MM * (2 * uniform() - 1);
  return {
    kind: 'ellipse',
    centreMm: [x + away(), y + away(), PLACED_MM],
    u: [c, s, 0],
    v: [-s, c, 0],
    radiiMm: [radius, radius * (0.6 + 0.4 * uniform())],
  } as const satisfies Shape;
}

class Tally {
  private placements = 0;
  private stated = 0;
  private naive = 0;
  private squares = 0;

  add(apart: number, standardError: number | null, naive: number | null): void {
    if (standardError === null) throw new RangeError('a placement without a standard error');
    this.placements += 1;
    this.squares += (apart / standardError) ** 2;
    if (Math.abs(apart) <= 1.96 * standardError) this.stated += 1;
    // One pixel has no SD, so the naive error covers nothing there.
    if (naive !== null && Math.abs(apart) <= 1.96 * naive) this.naive += 1;
  }

  coverage(): Coverage {
    const { placements, stated, naive, squares } = this;
    return { placements, stated, naive, ratio: Math.sqrt(squares / placements) };
  }
}
