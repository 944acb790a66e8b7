import { describe, expect, it } from 'vitest';
import { measureSharpness } from '../../../../core/pairing/sharpness.js';
import type { Apodisation } from '../../../../core/phantom/index.js';
import { huAt } from '../../../../core/phantom/index.js';
import type { Stack } from '../../../../core/stack/index.js';
import { type ImageStack, imageStack, readFrom } from '../../../bench/evidence/imageStack.js';
import {
  makePair,
  type PairRecipe,
  type ProjectionCache,
  type StackRecipe,
} from '../../../bench/evidence/phantomPair.js';
import { evidenceScene } from '../../../bench/evidence/randomScene.js';

const projections: ProjectionCache = new Map();
const grid = { centreMm: [12, -14], fieldOfViewMm: 92, matrix: 200 } as const;
const otherGrid = { centreMm: [10, -12], fieldOfViewMm: 98, matrix: 220 } as const;
const SCENE = 1;

const stackOf = (
  window: Apodisation,
  cutOffPerMm: number,
  change: Partial<StackRecipe> = {},
): StackRecipe => ({
  kernel: { apodisation: window, cutOffPerMm },
  grid,
  heightsMm: [8, 16],
  layers: 1,
  ...change,
});

const pairOf = (
  seed: number,
  first: StackRecipe,
  second: StackRecipe,
): readonly [ImageStack, ImageStack] => {
  const recipe: PairRecipe = {
    seed,
    scene: SCENE,
    photonsPerRay: 1.2e5,
    blurSigmaMm: 0.2,
    views: 200,
    first,
    second,
  };
  return makePair(recipe, projections);
};

const measure = async ([a, b]: readonly [ImageStack, ImageStack]) =>
  measureSharpness(a.stack, b.stack, readFrom(a, b), { slices: 2 });

// A sample of what npm run evidence does with 200: synthetic pairs whose kernels are known.
describe('the order of two kernels', () => {
  it.each([
    [1, stackOf('hann', 0.6), stackOf('hann', 0.75), 'first'],
    [2, stackOf('ram-lak', 0.9), stackOf('ram-lak', 0.7), 'second'],
    [3, stackOf('cosine', 0.7), stackOf('cosine', 0.98, { grid: otherGrid }), 'first'],
    [4, stackOf('shepp-logan', 1), stackOf('shepp-logan', 0.65), 'second'],
    [5, stackOf('hamming', 0.55), stackOf('hamming', 1.05, { grid: otherGrid }), 'first'],
    [6, stackOf('hann', 0.62), stackOf('cosine', 1.05), 'first'],
    [7, stackOf('hann', 1), stackOf('hann', 0.6, { layers: 2 }), 'second'],
  ] as const)('is found for pair %d', async (seed, first, second, softer) => {
    const got = await measure(pairOf(seed, first, second));
    expect(got.softer).toBe(softer);
    expect(got.confidence).toBeGreaterThan(0.9);
  });

  it('is not given for one kernel on two grids', async () => {
    const pair = pairOf(8, stackOf('hann', 0.8), stackOf('hann', 0.8, { grid: otherGrid }));
    expect((await measure(pair)).outcome).toBe('same-kernel');
  });

  it('is not given where thickness alone differs', async () => {
    const pair = pairOf(9, stackOf('cosine', 0.95), stackOf('cosine', 0.95, { layers: 2 }));
    const got = await measure(pair);
    expect([got.outcome, got.softer]).toEqual(['thickness-alone', undefined]);
    expect(got.noise?.level.value).toBeLessThan(-0.2);
  });
});

describe('measureSharpness', () => {
  const pair = pairOf(10, stackOf('hann', 0.6), stackOf('cosine', 1, { grid: otherGrid }));
  const [soft, sharp] = pair;

  it('says the same with the stacks exchanged', async () => {
    const there = await measure(pair);
    const back = await measure([sharp, soft]);
    expect([there.softer, back.softer]).toEqual(['first', 'second']);
    expect(back.noise?.level.value).toBeCloseTo(-(there.noise?.level.value ?? 0), 6);
    expect(back.edges?.rise.value).toBeCloseTo(-(there.edges?.rise.value ?? 0), 6);
  });

  it('finds areas that lie in one soft tissue and don’t overlap, the same on both grids', async () => {
    const { areas } = await measure(pair);
    expect(areas.length).toBeGreaterThanOrEqual(6);
    for (const { centreMm, sizeMm, first, second } of areas) {
      const scene = evidenceScene(SCENE, centreMm[2]);
      const half = sizeMm / 2 + 1;
      const truth = [-1, 0, 1].flatMap((x) =>
        [-1, 0, 1].map((y) => huAt(scene, centreMm[0] + x * half, centreMm[1] + y * half)),
      );
      expect(new Set(truth).size).toBe(1);
      const hu = truth[0] ?? Number.NaN;
      expect(hu).toBeGreaterThan(-50);
      expect(Math.abs(first.meanHu - hu)).toBeLessThan(8);
      expect(Math.abs(second.meanHu - hu)).toBeLessThan(8);
    }
    areas.forEach((a, index) => {
      for (const b of areas.slice(index + 1)) {
        const apart = [0, 1, 2].map((k) =>
          Math.abs((a.centreMm[k as 0] ?? 0) - (b.centreMm[k as 0] ?? 0)),
        );
        const sides = (a.sizeMm + b.sizeMm) / 2 - 1e-6;
        expect((apart[2] ?? 0) > 1 || Math.max(apart[0] ?? 0, apart[1] ?? 0) >= sides).toBe(true);
      }
    });
  });

  it('gives numbers of both stacks, their spectra on one axis, and the resolution', async () => {
    const { noise, edges, resolutionPerMm } = await measure(pair);
    expect(noise?.secondHu).toBeGreaterThan(noise?.firstHu ?? Infinity);
    expect(noise?.texture.secondPerMm).toBeGreaterThan(noise?.texture.firstPerMm ?? Infinity);
    expect(edges?.secondMm.value).toBeLessThan(edges?.firstMm.value ?? 0);
    expect(noise?.texture.second.frequencyPerMm).toEqual(noise?.texture.first.frequencyPerMm);
    expect([1 / 12, 1 / 8]).toContain(resolutionPerMm);
  });

  it('gives the texture of each stack up to the highest frequency of its own grid', async () => {
    const { textures, areas, noise } = await measure(pair);
    // 92 mm / 200 and 98 mm / 220 a pixel: 1.087 and 1.122 /mm, whole rings of 0.08 /mm.
    expect(textures?.first.frequencyPerMm.at(-1)).toBeCloseTo(1.04, 9);
    expect(textures?.second.frequencyPerMm.at(-1)).toBeCloseTo(1.12, 9);
    expect(textures?.first.frequencyPerMm.slice(0, 3).map((f) => f.toFixed(2))).toEqual([
      '0.02',
      '0.08',
      '0.16',
    ]);
    // The comparison takes the evenest areas of a slice, the texture all.
    expect(textures?.first.areas).toBeGreaterThanOrEqual(areas.length);
    expect(textures?.first.places).toHaveLength(textures?.first.areas ?? -1);
    expect((textures?.first.noiseSdHu ?? 0) / (noise?.firstHu ?? 1)).toBeGreaterThan(0.9);
    expect((textures?.first.noiseSdHu ?? 9) / (noise?.firstHu ?? 1)).toBeLessThan(1.3);
  });

  it('gives no texture where there are too few areas', async () => {
    const flat = imageStack('flat', grid, [
      { zMm: 8, hu: new Float64Array(200 * 200).fill(-900) },
      { zMm: 16, hu: new Float64Array(200 * 200).fill(-900) },
    ]);
    expect((await measure([flat, flat])).textures).toBeUndefined();
  });

  it('carries the mark of lossy compression', async () => {
    const slices = sharp.stack.slices.map((slice) => ({
      ...slice,
      image: { ...slice.image, acquisition: { ...slice.image.acquisition, lossy: true } },
    })) as unknown as Stack['slices'];
    const marked = { ...sharp, stack: { ...sharp.stack, slices } };
    const got = await measure([soft, marked]);
    expect(got.lossy).toEqual({ first: false, second: true });
    expect(got.flags.map(({ code }) => code)).toEqual(['lossy']);
  });

  it('looks at no padding', async () => {
    // Half of the second stack is padding: no area and no edge lies there.
    const stored = sharp.stored.map((values) =>
      Int16Array.from(values, (value, index) => (index % 220 < 110 ? -2000 : value)),
    );
    const slices = sharp.stack.slices.map((slice) => ({
      ...slice,
      image: {
        ...slice.image,
        pixels: { ...slice.image.pixels, padding: { low: -2000, high: -2000 } },
      },
    })) as unknown as Stack['slices'];
    const got = await measure([soft, { stack: { ...sharp.stack, slices }, stored }]);
    expect(got.areas.length + got.edgePlaces.length).toBeGreaterThan(0);
    for (const { centreMm, sizeMm } of got.areas)
      expect(centreMm[0] - sizeMm / 2).toBeGreaterThan(otherGrid.centreMm[0] - 0.5);
    for (const { atMm } of got.edgePlaces) expect(atMm[0]).toBeGreaterThan(otherGrid.centreMm[0]);
  });

  it.each([
    ['the values are not HU', (stack: Stack): Stack => ({ ...stack, unit: 'stored' })],
    ['positions of the two can’t be compared', (stack: Stack): Stack => inFrame(stack, '2.25.8')],
    ['the slices are turned against each other', turned],
    ['no slices in common could be read', lifted],
  ] as const)('can’t tell when %s', async (reason, change) => {
    const other = { ...sharp, stack: change(sharp.stack) };
    const first = { ...soft, stack: inFrame(soft.stack, '2.25.7') };
    const got = await measure([first, other]);
    expect([got.outcome, got.text, got.areas]).toEqual(['undecided', `can’t tell: ${reason}`, []]);
  });

  it('can’t tell when the slices can’t be read', async () => {
    const got = await measureSharpness(soft.stack, sharp.stack, async () => undefined);
    expect(got.text).toBe('can’t tell: no slices in common could be read');
  });

  it('can’t tell on images without a uniform area or an edge', async () => {
    const flat = (key: string, hu: number): ImageStack =>
      imageStack(key, { centreMm: [0, 0], fieldOfViewMm: 64, matrix: 64 }, [
        { zMm: 0, hu: new Float64Array(64 * 64).fill(hu) },
      ]);
    expect((await measure([flat('a', -1000), flat('b', -1000)])).text).toBe(
      'can’t tell: no uniform area and no clear edge in common',
    );
    // Soft tissue without any noise is no scan, and has no noise to compare.
    expect((await measure([flat('a', 40), flat('b', 40)])).outcome).toBe('undecided');
  });
});

function changed(
  stack: Stack,
  change: (slice: Stack['slices'][0]) => Partial<Stack['slices'][0]['image']>,
): Stack {
  const slices = stack.slices.map((slice) => ({
    ...slice,
    image: { ...slice.image, ...change(slice) },
  }));
  return { ...stack, slices: slices as unknown as Stack['slices'] };
}

function inFrame(stack: Stack, frameOfReferenceUid: string): Stack {
  return changed(stack, ({ image }) => ({
    acquisition: { ...image.acquisition, frameOfReferenceUid },
  }));
}

function turned(stack: Stack): Stack {
  return changed(stack, ({ image }) => ({
    grid: { ...image.grid, rowDirection: [0, 1, 0], columnDirection: [-1, 0, 0] },
  }));
}

function lifted(stack: Stack): Stack {
  return changed(stack, ({ image }) => {
    const [x, y, z] = image.grid.positionMm;
    return { grid: { ...image.grid, positionMm: [x, y, z + 500] } };
  });
}
