import { alongNormal } from '../geometry/index.js';
import type { KernelTexture } from '../quality/index.js';
import type { NoiseOfStack } from '../region/index.js';
import type { Stack } from '../stack/index.js';
import { fitStent } from '../stent/index.js';
import type { RegionGround } from './measureRegions.js';
import type { PlanStent } from './plan.js';
import { stentOnCutValue } from './stentOnCutValue.js';
import type { StentValue } from './stentSchema.js';
import { noStentValue, stentValue } from './stentValue.js';

/** A stent fitted on both kernels at once, or the reason why it has no values. */
export interface MeasuredStent extends Omit<StentValue, 'reason'> {
  readonly id: string;
  readonly reason?: string;
}

/** Slices on either side of the start that a fit may look at. */
const REACH_SLICES = 3;

const ONE_STACK = {
  code: 'one-stack',
  text: 'A stent is fitted on a soft and a sharp stack at once: the plan names one.',
} as const;

/** Fits the stents of a plan. Without a sharp stack in one space there is no joint fit. */
export function measureStents(
  stents: readonly PlanStent[],
  ground: RegionGround,
): readonly MeasuredStent[] {
  return stents.map((stent) => {
    const { reason, ...values } = fitOf(stent, ground);
    return { id: stent.id, ...values, ...(reason === null ? {} : { reason: reason.text }) };
  });
}

/** Fits one stent on both stacks, for the note and for a plan alike. */
export function fitOf(
  stent: Omit<PlanStent, 'id'>,
  { soft, sharp, storedOf, noise, notOnSharp, cuts }: RegionGround,
): StentValue {
  if (sharp === undefined) return noStentValue(ONE_STACK);
  if (notOnSharp !== undefined) return noStentValue(notOnSharp);
  const texture = { soft: textureOf(noise.soft), sharp: textureOf(noise.sharp) };
  const stacks = { soft, sharp, storedOf };
  if (stent.plane === undefined)
    return stentValue(fitStent(stent, soft, sharp, storedOf, texture), stacks);
  const plane = cuts.gridOf(stent.plane);
  if (!plane.ok) return noStentValue(plane.refusal);
  return stentOnCutValue(stent, plane.value, stacks, texture).value;
}

function textureOf(noise: NoiseOfStack): KernelTexture | null {
  return 'code' in noise ? null : noise;
}

/** Slices of a stack that fits look at: those next to each start. */
export function stentSlices(
  stents: readonly Pick<PlanStent, 'centreMm'>[],
  stack: Stack,
): readonly number[] {
  const { grid } = stack.slices[0].image;
  return stents.flatMap(({ centreMm }) => {
    const along = alongNormal(grid, centreMm);
    return stack.slices
      .map(({ alongMm }, index) => ({ index, apartMm: Math.abs(alongMm - along) }))
      .sort((a, b) => a.apartMm - b.apartMm)
      .slice(0, 2 * REACH_SLICES + 1)
      .map(({ index }) => index);
  });
}
