import { measureRegionOnCut } from '../oblique/index.js';
import {
  type Flag,
  measureRegion,
  type NoiseOfStack,
  notMeasured,
  type RegionValue,
} from '../region/index.js';
import type { Stack } from '../stack/index.js';
import type { StackStoredOf } from './measurePlan.js';
import type { PlanRegion } from './plan.js';
import type { PlanCuts } from './planCuts.js';
import type { Kernel } from './schema.js';

/** A region on both kernels; null on a kernel that the plan does not name. */
export interface MeasuredRegion {
  readonly id: string;
  readonly role: PlanRegion['role'];
  readonly soft: RegionValue;
  readonly sharp: RegionValue | null;
}

/** What regions are measured on. */
export interface RegionGround {
  readonly soft: Stack;
  readonly sharp: Stack | undefined;
  readonly storedOf: StackStoredOf;
  readonly cuts: PlanCuts;
  readonly noise: Readonly<Record<Kernel, NoiseOfStack>>;
  /** Why nothing may be measured on the sharp stack. */
  readonly notOnSharp: Flag | undefined;
}

/** Measures the regions of a plan, each on the slices or on its oblique plane. */
export function measureRegions(
  regions: readonly PlanRegion[],
  ground: RegionGround,
): readonly MeasuredRegion[] {
  const { soft, sharp, storedOf, cuts, noise, notOnSharp } = ground;
  const sideOf = (stack: Stack, kernel: Kernel) => ({
    stack,
    storedOf: (sliceIndex: number) => storedOf(stack, sliceIndex),
    noise: noise[kernel],
  });
  const sides = { soft: sideOf(soft, 'soft'), sharp: sharp && sideOf(sharp, 'sharp') };
  const on = ({ shape, plane }: PlanRegion, stack: Stack, kernel: Kernel): RegionValue => {
    if (plane !== undefined) {
      const cut = cuts.cutOf(plane, stack);
      return cut.ok ? measureRegionOnCut(shape, cut.value) : notMeasured(shape, cut.refusal);
    }
    const other = kernel === 'soft' ? sides.sharp : sides.soft;
    return measureRegion(
      shape,
      stack,
      (sliceIndex) => storedOf(stack, sliceIndex),
      noise[kernel],
      notOnSharp === undefined ? other : undefined,
    );
  };
  const onSharp = (region: PlanRegion, stack: Stack): RegionValue =>
    notOnSharp === undefined ? on(region, stack, 'sharp') : notMeasured(region.shape, notOnSharp);
  return regions.map((region) => ({
    id: region.id,
    role: region.role,
    soft: on(region, soft, 'soft'),
    sharp: sharp === undefined ? null : onSharp(region, sharp),
  }));
}
