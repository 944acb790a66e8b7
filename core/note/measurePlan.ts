import type { StoredValues } from '../dicom/index.js';
import { FLAGS, type Flag, findSlice, type NoiseOfStack } from '../region/index.js';
import { type Result, refuse, success } from '../result.js';
import type { Stack } from '../stack/index.js';
import { type MeasuredContrast, measuredContrast } from './measuredContrast.js';
import { edgeSlices, type MeasuredEdgeLine, measureEdges } from './measureEdges.js';
import { type MeasuredProfile, measureProfiles, profileSlices } from './measureProfiles.js';
import { type MeasuredRegion, measureRegions } from './measureRegions.js';
import { type MeasuredStent, measureStents, stentSlices } from './measureStents.js';
import type { Plan } from './plan.js';
import { planCuts } from './planCuts.js';
import { planeSlices } from './planeCuts.js';
import type { CutFacts } from './planes.js';
import type { Kernel } from './schema.js';

/** What a plan comes to; the document of the command line's `measure`. Nothing asked for is left out. */
export interface MeasuredPlan {
  readonly regions: readonly MeasuredRegion[];
  readonly contrasts: readonly ({ readonly id: string } & MeasuredContrast)[];
  readonly profiles: readonly MeasuredProfile[];
  readonly stents: readonly MeasuredStent[];
  /** Absent where the plan has no edge lines. */
  readonly edges?: readonly MeasuredEdgeLine[];
  /** How the oblique planes were cut; absent where the plan has none. Facts are null where a plane can't be cut. */
  readonly planes?: readonly { readonly id: string; readonly facts: CutFacts | null }[];
}

/** Stored values of one slice of a stack; undefined when they can't be had. */
export type StackStoredOf = (stack: Stack, sliceIndex: number) => StoredValues | undefined;

const NOT_MEASURED: Readonly<Record<Kernel, NoiseOfStack>> = {
  soft: FLAGS.noStandardError,
  sharp: FLAGS.noStandardError,
};

/**
 * Slices of one of the stacks that the plan's values rest on, ascending: read these before {@link measurePlan}. An oblique
 * plane may need all of them.
 */
export function slicesNeeded(
  plan: Plan,
  stack: Stack,
  { soft, sharp }: { readonly soft: Stack; readonly sharp: Stack | undefined },
): readonly number[] {
  const onSlices = <T extends { readonly plane?: string }>(items: readonly T[]): readonly T[] =>
    items.filter(({ plane }) => plane === undefined);
  const indices = new Set<number>([
    ...edgeSlices(onSlices(plan.edges ?? []), stack),
    ...profileSlices(onSlices(plan.profiles), stack),
    ...stentSlices(onSlices(plan.stents), stack),
    ...planeSlices(plan, stack, soft, sharp),
  ]);
  for (const { shape } of onSlices(plan.regions)) {
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
    'oblique plane': plan.planes ?? [],
  })) {
    const twice = repeatedId(list);
    if (twice !== undefined) {
      return refuse('duplicate-id', `The plan has more than one ${what} ${twice}. Name each once.`);
    }
  }
  const cuts = planCuts(plan, soft, sharp, storedOf);
  const ground = { soft, sharp, storedOf, cuts, noise, notOnSharp };
  const regions = measureRegions(plan.regions, ground);
  const byId = new Map(regions.map((region) => [region.id, region]));
  const kernels: readonly Kernel[] = sharp === undefined ? ['soft'] : ['soft', 'sharp'];
  return success({
    regions,
    contrasts: plan.contrasts.map((contrast) => ({
      id: contrast.id,
      ...measuredContrast(contrast, kernels, (id, kernel) => byId.get(id)?.[kernel]),
    })),
    profiles: measureProfiles(plan.profiles, ground),
    stents: measureStents(plan.stents, ground),
    ...(plan.edges === undefined ? {} : { edges: measureEdges(plan.edges, ground) }),
    ...(plan.planes === undefined
      ? {}
      : { planes: plan.planes.map(({ id }) => ({ id, facts: cuts.factsOf(id) ?? null })) }),
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
