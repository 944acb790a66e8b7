import { measureSharpness } from '../../../core/pairing/sharpness.js';
import { readFrom } from './imageStack.js';
import { makePair, type StackRecipe } from './phantomPair.js';

/** What the measure may take for a pair of stacks of 512² at five heights, in one thread. */
export const SHARPNESS_BUDGET_MS = 150;

/** Median time of the measure on the demonstration's scene, ms; the pair is in memory. */
export async function sharpnessTimeMs(): Promise<number> {
  const recipe = (cutOffPerMm: number): StackRecipe => ({
    kernel: { apodisation: 'cosine', cutOffPerMm },
    grid: { centreMm: [24, -14], fieldOfViewMm: 200, matrix: 512 },
    heightsMm: [2, 7, 12, 17, 21],
    layers: 1,
  });
  const pair = makePair({
    seed: 1,
    scene: 0,
    photonsPerRay: 1.6e5,
    blurSigmaMm: 0.18,
    views: 480,
    first: recipe(0.62),
    second: recipe(1.2),
  });
  const times: number[] = [];
  for (let run = 0; run < 15; run += 1) {
    const start = performance.now();
    await measureSharpness(pair[0].stack, pair[1].stack, readFrom(...pair));
    times.push(performance.now() - start);
  }
  return times.sort((a, b) => a - b)[7] ?? Number.NaN;
}
