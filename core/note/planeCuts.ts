import type { SliceGrid } from '../geometry/index.js';
import {
  angleToSlicesDeg,
  asSlice,
  type CutOptions,
  type CutSlice,
  cutStack,
  obliquePlane,
  resamplingInWords,
  slicesOfCut,
} from '../oblique/index.js';
import type { Flag, StoredOf } from '../region/index.js';
import { type Result, success } from '../result.js';
import type { Stack } from '../stack/index.js';
import type { Plan, PlanPlane } from './plan.js';
import type { CutFacts } from './planes.js';

/** Half of what is cut beside a plane on which a stent is fitted, mm: the fit looks at several planes. */
const STENT_REACH_MM = 2;

/** How a plane of the note is cut: cubic where nothing is said, since a fit of edges needs it. */
export function cutOptionsOf({ interpolation = 'cubic', slabMm }: PlanPlane): CutOptions {
  return { interpolation, slabMm };
}

/** The pixel grid of a plane: one for both stacks. */
export function planeGridOf(
  { courseMm }: Pick<PlanPlane, 'courseMm'>,
  soft: Stack,
  sharp: Stack | undefined,
): Result<SliceGrid> {
  const grids = sharp === undefined ? [] : [sharp.slices[0].image.grid];
  return obliquePlane(courseMm, [soft.slices[0].image.grid, ...grids]);
}

/** A plane cut from one stack. */
export function cutPlaneOf(
  plane: PlanPlane,
  grid: SliceGrid,
  stack: Stack,
  storedOf: StoredOf,
): Result<{ readonly cut: CutSlice; readonly lacking: readonly number[] }> {
  const cut = cutStack(stack, storedOf, grid, cutOptionsOf(plane));
  if (!cut.ok) return cut;
  return success({ cut: asSlice(cut.value), lacking: cut.value.lacking });
}

/** What the note keeps of a plane once it was cut. */
export function cutFacts(
  grid: SliceGrid,
  cuts: { readonly soft: CutSlice; readonly sharp: CutSlice | undefined },
): CutFacts {
  return {
    angleDeg: angleToSlicesDeg(grid, cuts.soft.of.slices[0].image.grid),
    resampling: resamplingInWords(cuts.soft.resampling),
    source: { soft: cuts.soft.source, sharp: cuts.sharp?.source ?? null },
  };
}

/** What something on a plane has that the plan does not name. */
export function unknownPlane(id: string): Flag {
  return { code: 'unknown-plane', text: `The plan has no oblique plane ${id}.` };
}

/** The planes of a plan that something is measured on. */
export function planesInUse({
  planes = [],
  regions,
  profiles,
  stents,
  edges = [],
}: Plan): readonly PlanPlane[] {
  const used = new Set([...regions, ...profiles, ...stents, ...edges].map(({ plane }) => plane));
  return planes.filter(({ id }) => used.has(id));
}

/** Slices of a stack that the plan's planes are cut from. */
export function planeSlices(
  plan: Plan,
  stack: Stack,
  soft: Stack,
  sharp: Stack | undefined,
): readonly number[] {
  return planesInUse(plan).flatMap((plane) => {
    const grid = planeGridOf(plane, soft, sharp);
    if (!grid.ok) return [];
    const isFitted = plan.stents.some((stent) => stent.plane === plane.id);
    const slabMm = Math.max(plane.slabMm ?? 0, isFitted ? 2 * STENT_REACH_MM : 0);
    return slicesOfCut(stack, grid.value, slabMm > 0 ? { slabMm } : {});
  });
}
