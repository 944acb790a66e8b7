import type { StoredValues } from '../dicom/index.js';
import {
  FLAGS,
  type Flag,
  findSlice,
  measureRegion,
  type NoiseOfStack,
  notMeasured,
  type RegionValue,
} from '../region/index.js';
import { type Result, refuse, success } from '../result.js';
import type { Stack } from '../stack/index.js';
import { type MeasuredContrast, measuredContrast } from './measuredContrast.js';
import { edgeSlices, type MeasuredEdgeLine, measureEdges } from './measureEdges.js';
import { type MeasuredProfile, measureProfiles, profileSlices } from './measureProfiles.js';
import { type MeasuredStent, measureStents, stentSlices } from './measureStents.js';
import type { Plan, PlanRegion } from './plan.js';
import type { Kernel } from './schema.js';

/** What a plan comes to; the document of the command line's `measure`. Nothing asked for is left out. */
export interface MeasuredPlan {
  readonly regions: readonly MeasuredRegion[];
  readonly contrasts: readonly ({ readonly id: string } & MeasuredContrast)[];
  readonly profiles: readonly MeasuredProfile[];
  readonly stents: readonly MeasuredStent[];
  /** Absent where the plan has no edge lines. */
  readonly edges?: readonly MeasuredEdgeLine[];
}

/** A region on both kernels; null on a kernel that the plan does not name. */
export interface MeasuredRegion {
  readonly id: string;
  readonly role: PlanRegion['role'];
  readonly soft: RegionValue;
  readonly sharp: RegionValue | null;
}

/** Stored values of one slice of a stack; undefined when they can't be had. */
export type StackStoredOf = (stack: Stack, sliceIndex: number) => StoredValues | undefined;

const NOT_MEASURED: Readonly<Record<Kernel, NoiseOfStack>> = {
  soft: FLAGS.noStandardError,
  sharp: FLAGS.noStandardError,
};

/** Slices of a stack that the plan's regions lie on, ascending: read these before {@link measurePlan}. */
export function slicesNeeded(plan: Plan, stack: Stack): readonly number[] {
  const indices = new Set<number>([
    ...edgeSlices(plan.edges ?? [], stack),
    ...profileSlices(plan.profiles, stack),
    ...stentSlices(plan.stents, stack),
  ]);
  for (const { shape } of plan.regions) {
    const found = findSlice(shape, stack);
    if (found.ok) indices.add(found.value.sliceIndex);
  }
  return [...indices].sort((a, b) => a - b);
}

/**
 * Measures a plan on one stack or on both. A region that lies on no slice, or a contrast of an unknown region, has
 * null values and a flag that says why, and the rest goes on. Two things under one identifier are refused: no value
 * could then be told from another.
 *
 * @param notOnSharp why nothing may be measured on the sharp stack: another patient, another frame of reference
 * @param noise the noise of both kernels, for the standard errors, or why it is not known
 */
export function measurePlan(
  plan: Plan,
  soft: Stack,
  sharp: Stack | undefined,
  storedOf: StackStoredOf,
  notOnSharp?: Flag,
  noise: Readonly<Record<Kernel, NoiseOfStack>> = NOT_MEASURED,
): Result<MeasuredPlan> {
  for (const [what, list] of Object.entries({
    region: plan.regions,
    contrast: plan.contrasts,
    profile: plan.profiles,
    stent: plan.stents,
    'edge line': plan.edges ?? [],
  })) {
    const twice = repeatedId(list);
    if (twice !== undefined) {
      return refuse('duplicate-id', `The plan has more than one ${what} ${twice}. Name each once.`);
    }
  }
  const sideOf = (stack: Stack, kernel: Kernel) => ({
    stack,
    storedOf: (sliceIndex: number) => storedOf(stack, sliceIndex),
    noise: noise[kernel],
  });
  const [softSide, sharpSide] = [sideOf(soft, 'soft'), sharp && sideOf(sharp, 'sharp')];
  const isOneSpace = notOnSharp === undefined;
  const on = (stack: Stack, { shape }: PlanRegion, kernel: Kernel) =>
    measureRegion(
      shape,
      stack,
      (sliceIndex) => storedOf(stack, sliceIndex),
      noise[kernel],
      isOneSpace ? (kernel === 'soft' ? sharpSide : softSide) : undefined,
    );
  const onSharp = (stack: Stack, region: PlanRegion) =>
    notOnSharp === undefined ? on(stack, region, 'sharp') : notMeasured(region.shape, notOnSharp);
  const regions = plan.regions.map(
    (region): MeasuredRegion => ({
      id: region.id,
      role: region.role,
      soft: on(soft, region, 'soft'),
      sharp: sharp === undefined ? null : onSharp(sharp, region),
    }),
  );
  const byId = new Map(regions.map((region) => [region.id, region]));
  const kernels: readonly Kernel[] = sharp === undefined ? ['soft'] : ['soft', 'sharp'];
  return success({
    regions,
    contrasts: plan.contrasts.map((contrast) => ({
      id: contrast.id,
      ...measuredContrast(contrast, kernels, (id, kernel) => byId.get(id)?.[kernel]),
    })),
    profiles: measureProfiles(plan.profiles, soft, sharp, storedOf, notOnSharp),
    stents: measureStents(plan.stents, soft, sharp, storedOf, noise, notOnSharp),
    ...(plan.edges === undefined
      ? {}
      : { edges: measureEdges(plan.edges, soft, sharp, storedOf, notOnSharp) }),
  });
}

function repeatedId(list: readonly { readonly id: string }[]): string | undefined {
  const seen = new Set<string>();
  for (const { id } of list) {
    if (seen.has(id)) return id;
    seen.add(id);
  }
  return undefined;
}
