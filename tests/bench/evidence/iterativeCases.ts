import { measureSharpness } from '../../../core/pairing/sharpness.js';
import {
  addQuantumNoise,
  type ImageGrid,
  projectSlice,
  seededUniform,
  type UniformSource,
} from '../../../core/phantom/index.js';
import { type AlgebraicRecipe, algebraicHu } from './algebraic.js';
import { imageStack, readFrom } from './imageStack.js';
import { casesOf, type GridCase } from './stentGrid.js';
import type { StentPair } from './stentPhantom.js';
import {
  drawStents,
  STENT_HEIGHTS_MM,
  STENT_SCAN,
  stentSlice,
  type TrueStent,
} from './stentScene.js';

/** Holds the whole body: what lies outside of an algebraic image is put into it. */
const GRID: ImageGrid = { centreMm: [0, 0], fieldOfViewMm: 118.75, matrix: 304 };

/** Pairs of strengths: much smoothing, less, so little that it can hardly be told, and one that spares strong edges alone. */
const RECIPES: readonly Readonly<Record<'soft' | 'sharp', AlgebraicRecipe>>[] = [
  {
    soft: { passes: 3, edgeHu: 90, smoothing: 0.8 },
    sharp: { passes: 3, edgeHu: 50, smoothing: 0.5 },
  },
  {
    soft: { passes: 1, edgeHu: 60, smoothing: 0.4 },
    sharp: { passes: 1, edgeHu: 20, smoothing: 0.03 },
  },
  {
    soft: { passes: 1, edgeHu: 40, smoothing: 0.3 },
    sharp: { passes: 1, edgeHu: 40, smoothing: 0.1 },
  },
  {
    soft: { passes: 2, edgeHu: 400, smoothing: 0.6 },
    sharp: { passes: 2, edgeHu: 200, smoothing: 0.1 },
  },
];

/** Seven stents of one acquisition on two algebraic reconstructions with edge-preserving smoothing. */
export async function iterativeCases(batch: number, index: number): Promise<readonly GridCase[]> {
  const { pair, stents, uniform } = await iterativePair(batch, index);
  return casesOf(pair, stents, uniform, ['both']);
}

/** The pair of images, with its stents. */
export async function iterativePair(
  batch: number,
  index: number,
): Promise<{
  readonly pair: StentPair;
  readonly stents: readonly TrueStent[];
  readonly uniform: UniformSource;
}> {
  const uniform = seededUniform(batch, index, 4);
  const stents = drawStents(uniform, 10);
  const recipe = RECIPES[index % RECIPES.length] as (typeof RECIPES)[number];
  const slices = STENT_HEIGHTS_MM.map((zMm, slice) => {
    const clean = projectSlice(stentSlice(stents, zMm, 380), STENT_SCAN);
    const noisy = addQuantumNoise(clean, 1.2e4, seededUniform(batch, 50 + index, slice));
    const on = (side: 'soft' | 'sharp') => algebraicHu(noisy, STENT_SCAN, GRID, recipe[side]);
    return { zMm, soft: on('soft'), sharp: on('sharp') };
  });
  const stackOf = (side: 'soft' | 'sharp') =>
    imageStack(
      side,
      GRID,
      slices.map((slice) => ({ zMm: slice.zMm, hu: slice[side] })),
    );
  const [soft, sharp] = [stackOf('soft'), stackOf('sharp')];
  const { textures, text } = await measureSharpness(soft.stack, sharp.stack, readFrom(soft, sharp));
  if (textures === undefined) throw new RangeError(`nothing measured: ${text}`);
  const pair: StentPair = {
    soft,
    sharp,
    texture: { soft: textures.first, sharp: textures.second },
  };
  return { pair, stents, uniform };
}
