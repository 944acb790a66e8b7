import type { Kernel as Side } from '../../../core/note/index.js';
import { seededUniform } from '../../../core/phantom/index.js';
import { measureRegion, type Shape, type StackBeside } from '../../../core/region/index.js';
import {
  type EdgePhantom,
  type EdgeRecipe,
  edgePhantom,
  placeAway,
  placeBeside,
} from './edgePlacements.js';

/** How many placements were flagged for a strut or calcium, of how many; and for which the name was right. */
export interface EdgeTally {
  readonly placed: number;
  readonly flagged: number;
  readonly named: number;
}

export const EDGE_GROUPS = ['within one blur', 'two blurs away', 'farther'] as const;
export type EdgeGroup = (typeof EDGE_GROUPS)[number];

export type EdgeTallies = Readonly<Record<Side, Readonly<Record<EdgeGroup, EdgeTally>>>>;

const SIDES: readonly Side[] = ['soft', 'sharp'];
const DENSE = ['near-strut', 'near-calcium'];

/**
 * Places regions on a phantom within one blur of a strut or calcium, two to three blurs away from all, and anywhere
 * farther than two blurs from all (lumen, chambers, fat, muscle), and counts the flags as the program gives them.
 */
export async function countEdges(recipe: EdgeRecipe, placements: number): Promise<EdgeTallies> {
  const phantom = await edgePhantom(recipe);
  const on = (side: Side) => ({
    'within one blur': count(phantom, side, placements, recipe.seed, (uniform, blurMm) =>
      placeBeside(phantom.scene, uniform, 0, blurMm),
    ),
    'two blurs away': count(phantom, side, placements, recipe.seed + 1000, (uniform, blurMm) =>
      placeBeside(phantom.scene, uniform, 2 * blurMm, 3 * blurMm),
    ),
    farther: count(phantom, side, placements, recipe.seed + 2000, (uniform, blurMm) =>
      placeAway(phantom.scene, uniform, 2 * blurMm),
    ),
  });
  return { soft: on('soft'), sharp: on('sharp') };
}

function count(
  { stacks, textures }: EdgePhantom,
  side: Side,
  placements: number,
  stream: number,
  place: (
    uniform: ReturnType<typeof seededUniform>,
    blurMm: number,
  ) => { readonly shape: Shape; readonly kind: string },
): EdgeTally {
  const sideOf = (one: Side): StackBeside => ({
    stack: stacks[one].stack,
    storedOf: (index) => stacks[one].stored[index],
    noise: textures[one],
  });
  const [own, beside] = [sideOf(side), sideOf(side === 'soft' ? 'sharp' : 'soft')];
  const { blurFwhmMm } = textures[side];
  if (blurFwhmMm === null) throw new RangeError('the blur was not measured');
  const uniform = seededUniform(stream, side === 'soft' ? 1 : 2);
  let [flagged, named] = [0, 0];
  for (let placed = 0; placed < placements; placed += 1) {
    const { shape, kind } = place(uniform, blurFwhmMm);
    const { flags } = measureRegion(shape, own.stack, own.storedOf, own.noise, beside);
    const codes = flags.map(({ code }) => code).filter((code) => DENSE.includes(code));
    if (codes.length > 0) flagged += 1;
    if (codes.includes(`near-${kind}`)) named += 1;
  }
  return { placed: placements, flagged, named };
}

const DEMONSTRATION_KERNELS = {
  soft: { apodisation: 'hann', cutOffPerMm: 0.62 },
  sharp: { apodisation: 'cosine', cutOffPerMm: 1.26 },
} as const;
const OTHER_KERNELS = {
  soft: { apodisation: 'cosine', cutOffPerMm: 0.7 },
  sharp: { apodisation: 'shepp-logan', cutOffPerMm: 1.1 },
} as const;

/**
 * 25 phantoms of 20 placements in each group and on each kernel: 500. Fifteen have 15 to 25 HU of noise on the sharp
 * kernel and rings of 250 to 800 HU·mm, ten have 40 to 50 HU and rings of 350 to 800. A weaker ring at the border of
 * a lumen rises above it by less than a sixth on the sharp kernel, and is lost in the lumen's spread and noise.
 */
export const EDGE_RECIPES: readonly EdgeRecipe[] = Array.from({ length: 25 }, (_, index) => ({
  seed: index + 1,
  photonsPerRay: index % 5 === 0 ? 1e5 : index % 5 < 3 ? 5e4 : 2e4,
  kernels: index % 2 === 0 ? DEMONSTRATION_KERNELS : OTHER_KERNELS,
  leastStrutHuMm: index % 5 < 3 ? 250 : 350,
}));

/** Prints the counts. @returns whether all within one blur were flagged, and none two blurs away */
export async function reportEdges(
  print: (line: string) => void,
  recipes: readonly EdgeRecipe[] = EDGE_RECIPES,
): Promise<boolean> {
  print('Strong edges: regions flagged for a strut or calcium, of random placements');
  const sums = new Map<string, { placed: number; flagged: number; named: number }>();
  for (const recipe of recipes) {
    const tallies = await countEdges(recipe, 20);
    for (const side of SIDES)
      for (const group of EDGE_GROUPS) {
        const key = `${side}, ${group}`;
        const { placed, flagged, named } = tallies[side][group];
        const sum = sums.get(key) ?? { placed: 0, flagged: 0, named: 0 };
        sums.set(key, {
          placed: sum.placed + placed,
          flagged: sum.flagged + flagged,
          named: sum.named + named,
        });
        const isRight = group === 'within one blur' ? flagged === placed : flagged === 0;
        if (!isRight) print(`  phantom ${recipe.seed}, ${key}: ${flagged} of ${placed}`);
      }
  }
  let isKept = true;
  for (const [key, { placed, flagged, named }] of sums) {
    const isNear = key.endsWith('within one blur');
    isKept &&= flagged === (isNear ? placed : 0);
    const name = isNear ? `, ${named} by the right name` : '';
    print(`  ${key.padEnd(24)} ${String(flagged).padStart(4)} of ${placed}${name}`);
  }
  print(isKept ? 'kept: all within one blur, none two blurs away' : 'MISSED: not all, or too many');
  return isKept;
}
