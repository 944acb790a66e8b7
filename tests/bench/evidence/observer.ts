import type { Kernel as Side } from '../../../core/note/index.js';
import { measureSharpness } from '../../../core/pairing/sharpness.js';
import {
  addQuantumNoise,
  firstPixelMm,
  type Kernel,
  pixelMm,
  projectSlice,
  reconstructPairHu,
  type Sinogram,
  seededUniform,
} from '../../../core/phantom/index.js';
import { type DiscTexture, detectability } from '../../../core/quality/index.js';
import { imageStack, readFrom } from './imageStack.js';
import { DISC_PLACES_MM, OBSERVER_GRID, OBSERVER_SCAN, observerScene } from './observerScene.js';

/** An acquisition whose two kernels an observer looks at. */
export interface ObserverRecipe {
  readonly seed: number;
  readonly photonsPerRay: number;
  readonly kernels: Readonly<Record<Side, Kernel>>;
  readonly contrastHu: number;
  readonly diametersMm: readonly number[];
  /** Noisy slices without a disc, and as many with discs of each diameter. */
  readonly realisations: number;
}

type Images = Readonly<Record<Side, Float64Array>>;

/** d′ of one diameter as the simulated observer had it, at the recipe's contrast. */
export interface SimulatedDisc {
  readonly diameterMm: number;
  readonly detectability: Readonly<Record<Side, number>>;
}

export const SIDES: readonly Side[] = ['soft', 'sharp'];

function imagesOf(sinogram: Sinogram, { kernels }: ObserverRecipe): Images {
  const [soft, sharp] = reconstructPairHu(
    sinogram,
    OBSERVER_SCAN,
    [kernels.soft, kernels.sharp],
    OBSERVER_GRID,
  );
  return { soft, sharp };
}

/** The texture of both kernels as the program measures it: in uniform areas and on edges of a noisy pair of stacks. */
export async function measuredTextures(
  recipe: ObserverRecipe,
): Promise<Readonly<Record<Side, DiscTexture>>> {
  const clean = projectSlice(observerScene(), OBSERVER_SCAN);
  const slices = Array.from({ length: 5 }, (_, index) => ({
    zMm: index * 0.6,
    images: noisy(clean, recipe, 9, index),
  }));
  const [soft, sharp] = SIDES.map((side) =>
    imageStack(
      side,
      OBSERVER_GRID,
      slices.map(({ zMm, images }) => ({ zMm, hu: images[side] })),
    ),
  );
  if (soft === undefined || sharp === undefined) throw new RangeError('no stacks');
  const measured = await measureSharpness(soft.stack, sharp.stack, readFrom(soft, sharp));
  if (measured.textures === undefined) throw new RangeError(`nothing measured: ${measured.text}`);
  return { soft: measured.textures.first, sharp: measured.textures.second };
}

function noisy(clean: Sinogram, recipe: ObserverRecipe, ...stream: readonly number[]): Images {
  const uniform = seededUniform(recipe.seed, ...stream);
  return imagesOf(addQuantumNoise(clean, recipe.photonsPerRay, uniform), recipe);
}

/**
 * A matched filter that does not prewhiten, on the phantom: its template is the disc as the kernel shows it, without
 * noise; it looks at slices with and without discs, each with quantum noise of its own. d′ is the distance of its two
 * mean responses over the root of the mean of their variances (ICRU report 54, 1996), pooled over places.
 */
export function simulatedDiscs(recipe: ObserverRecipe): readonly SimulatedDisc[] {
  const clean = projectSlice(observerScene(), OBSERVER_SCAN);
  const plain = imagesOf(clean, recipe);
  const absent = Array.from({ length: recipe.realisations }, (_, n) => noisy(clean, recipe, 0, n));
  return recipe.diametersMm.map((diameterMm, index) => {
    const scene = observerScene({ diameterMm, contrastHu: recipe.contrastHu });
    const withDiscs = projectSlice(scene, OBSERVER_SCAN);
    const shown = imagesOf(withDiscs, recipe);
    const templates = {
      soft: templatesOf(shown.soft, plain.soft, diameterMm),
      sharp: templatesOf(shown.sharp, plain.sharp, diameterMm),
    };
    const without = { soft: new Responses(), sharp: new Responses() };
    const present = { soft: new Responses(), sharp: new Responses() };
    for (let n = 0; n < recipe.realisations; n += 1) {
      const seen = noisy(withDiscs, recipe, 1 + index, n);
      for (const side of SIDES) {
        present[side].add(templates[side], seen[side]);
        const image = absent[n]?.[side];
        if (image !== undefined) without[side].add(templates[side], image);
      }
    }
    const value = (side: Side): number =>
      (present[side].mean() - without[side].mean()) /
      Math.sqrt((present[side].variance() + without[side].variance()) / 2);
    return { diameterMm, detectability: { soft: value('soft'), sharp: value('sharp') } };
  });
}

/** Pixels around one place, and what the disc adds to each. */
interface Template {
  readonly pixels: Int32Array;
  readonly weights: Float64Array;
}

/** Around the disc, this much of what it adds is looked at: blur and ringing of the kernel, mm. */
const MARGIN_MM = 4;

function templatesOf(
  shown: Float64Array,
  plain: Float64Array,
  diameterMm: number,
): readonly Template[] {
  const { matrix } = OBSERVER_GRID;
  const step = pixelMm(OBSERVER_GRID);
  const [left, top] = firstPixelMm(OBSERVER_GRID);
  const reach = Math.ceil((diameterMm / 2 + MARGIN_MM) / step);
  return DISC_PLACES_MM.map(([x, y]) => {
    const [column, row] = [Math.round((x - left) / step), Math.round((y - top) / step)];
    const pixels: number[] = [];
    for (let r = row - reach; r <= row + reach; r += 1)
      for (let c = column - reach; c <= column + reach; c += 1) pixels.push(r * matrix + c);
    return {
      pixels: Int32Array.from(pixels),
      weights: Float64Array.from(pixels, (at) => (shown[at] ?? 0) - (plain[at] ?? 0)),
    };
  });
}

/** Responses of the templates over realisations. Each place has its own mean: the tissue around it is its own. */
class Responses {
  private readonly all: number[][] = [];

  add(templates: readonly Template[], image: Float64Array): void {
    templates.forEach(({ pixels, weights }, place) => {
      let sum = 0;
      for (let index = 0; index < pixels.length; index += 1)
        sum += (weights[index] ?? 0) * (image[pixels[index] ?? 0] ?? 0);
      let list = this.all[place];
      if (list === undefined) {
        list = [];
        this.all[place] = list;
      }
      list.push(sum);
    });
  }

  mean(): number {
    return average(this.all.map(average));
  }

  variance(): number {
    return average(
      this.all.map((list) => {
        const mean = average(list);
        return list.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (list.length - 1);
      }),
    );
  }
}

function average(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

/**
 * The smallest diameter of which the simulated d′ reaches k at a contrast: straight lines of ln d′ over ln diameter
 * between the simulated ones. Undefined outside them. d′ is in proportion to contrast: a disc alters its rays' quanta
 * by less than a hundredth.
 */
export function simulatedVisibleMm(
  discs: readonly SimulatedDisc[],
  side: Side,
  simulatedHu: number,
  contrastHu: number,
  k: number,
): number | undefined {
  const wanted = Math.log((k * simulatedHu) / contrastHu);
  const heights = discs.map((disc) => Math.log(disc.detectability[side]));
  const above = heights.findIndex((height) => height >= wanted);
  const [low, high] = [discs[above - 1], discs[above]];
  if (low === undefined || high === undefined) return undefined;
  const [from, to] = [heights[above - 1] ?? 0, heights[above] ?? 0];
  const share = (wanted - from) / (to - from);
  return low.diameterMm * (high.diameterMm / low.diameterMm) ** share;
}

/** d′ by the formula from the measured texture. */
export function formulaDetectability(
  texture: DiscTexture,
  diameterMm: number,
  contrastHu: number,
): number {
  const value = detectability(texture, diameterMm, contrastHu);
  if (!value.ok) throw new RangeError(value.refusal.text);
  return value.value;
}
