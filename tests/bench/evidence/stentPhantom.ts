import { measureSharpness } from '../../../core/pairing/sharpness.js';
import {
  addQuantumNoise,
  type ImageGrid,
  type Kernel,
  projectSlice,
  reconstructHu,
  reconstructPairHu,
  type SceneSlice,
  seededUniform,
} from '../../../core/phantom/index.js';
import type { PairTexture } from '../../../core/quality/index.js';
import { type ImageStack, imageStack, readFrom } from './imageStack.js';
import { STENT_GRID, STENT_HEIGHTS_MM, STENT_SCAN } from './stentScene.js';

/** A pair of stacks as the program sees it, with its measured textures. */
export interface StentPair {
  readonly soft: ImageStack;
  readonly sharp: ImageStack;
  readonly texture: PairTexture;
}

export interface StentRecipe {
  readonly seed: number;
  readonly photonsPerRay: number;
  readonly kernels: { readonly soft: Kernel; readonly sharp: Kernel };
  readonly grid?: ImageGrid;
  /** Grid of the sharp reconstruction, where it is another. */
  readonly sharpGrid?: ImageGrid;
}

/** Scans a scene, whose slices have quantum noise of their own, and measures the textures as the program does. */
export async function stentPair(
  sceneAt: (zMm: number) => SceneSlice,
  { seed, photonsPerRay, kernels, grid = STENT_GRID, sharpGrid = grid }: StentRecipe,
): Promise<StentPair> {
  const slices = STENT_HEIGHTS_MM.map((zMm, index) => {
    const clean = projectSlice(sceneAt(zMm), STENT_SCAN);
    const noisy = addQuantumNoise(clean, photonsPerRay, seededUniform(seed, 2, index));
    const [soft, same] = reconstructPairHu(noisy, STENT_SCAN, [kernels.soft, kernels.sharp], grid);
    const sharp =
      sharpGrid === grid ? same : reconstructHu(noisy, STENT_SCAN, kernels.sharp, sharpGrid);
    return { zMm, soft, sharp };
  });
  const stack = (side: 'soft' | 'sharp'): ImageStack =>
    imageStack(
      side,
      side === 'soft' ? grid : sharpGrid,
      slices.map((slice) => ({ zMm: slice.zMm, hu: slice[side] })),
    );
  const [soft, sharp] = [stack('soft'), stack('sharp')];
  const { textures, text } = await measureSharpness(soft.stack, sharp.stack, readFrom(soft, sharp));
  if (textures === undefined) throw new RangeError(`nothing measured: ${text}`);
  return { soft, sharp, texture: { soft: textures.first, sharp: textures.second } };
}
