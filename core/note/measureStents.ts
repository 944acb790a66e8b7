import { alongNormal, type Vec3 } from '../geometry/index.js';
import type { KernelTexture } from '../quality/index.js';
import type { Flag, NoiseOfStack } from '../region/index.js';
import type { Stack } from '../stack/index.js';
import { type Estimated, fitStent } from '../stent/index.js';
import type { StackStoredOf } from './measurePlan.js';
import type { PlanStent } from './plan.js';
import type { Kernel } from './schema.js';

/** A stent fitted on both kernels at once, or the reason why it has no values. */
export interface MeasuredStent {
  readonly id: string;
  readonly strutDiameterMm: Estimated | null;
  readonly lumenHu: Estimated | null;
  readonly reason?: string;
}

/** Slices on either side of the start that a fit may look at. */
const REACH_SLICES = 3;

/** Fits the stents of a plan. Without a sharp stack in one space there is no joint fit. */
export function measureStents(
  stents: readonly PlanStent[],
  soft: Stack,
  sharp: Stack | undefined,
  storedOf: StackStoredOf,
  noise: Readonly<Record<Kernel, NoiseOfStack>>,
  notOnSharp?: Flag,
): readonly MeasuredStent[] {
  const without = (id: string, reason: string): MeasuredStent => ({
    id,
    strutDiameterMm: null,
    lumenHu: null,
    reason,
  });
  return stents.map((stent) => {
    if (sharp === undefined) {
      return without(
        stent.id,
        'A stent is fitted on a soft and a sharp stack at once: the plan names one.',
      );
    }
    if (notOnSharp !== undefined) return without(stent.id, notOnSharp.text);
    const texture = { soft: textureOf(noise.soft), sharp: textureOf(noise.sharp) };
    const fitted = fitStent(stent, soft, sharp, storedOf, texture);
    return fitted.reason !== undefined
      ? without(stent.id, fitted.reason.text)
      : { id: stent.id, strutDiameterMm: fitted.strutDiameterMm, lumenHu: fitted.lumenHu };
  });
}

function textureOf(noise: NoiseOfStack): KernelTexture | null {
  return 'code' in noise ? null : noise;
}

/** Slices of a stack that fits look at: those next to each start. */
export function stentSlices(stents: readonly PlanStent[], stack: Stack): readonly number[] {
  const { grid } = stack.slices[0].image;
  return stents.flatMap(({ centreMm }) => {
    const along = alongNormal(grid, centreMm as Vec3);
    return stack.slices
      .map(({ alongMm }, index) => ({ index, apartMm: Math.abs(alongMm - along) }))
      .sort((a, b) => a.apartMm - b.apartMm)
      .slice(0, 2 * REACH_SLICES + 1)
      .map(({ index }) => index);
  });
}
