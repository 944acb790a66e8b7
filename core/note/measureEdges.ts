import { measureEdgeLineOnCut } from '../oblique/index.js';
import {
  type EdgeValue,
  edgeNotMeasured,
  findLineSlice,
  measureEdgeLine,
} from '../region/index.js';
import type { Stack } from '../stack/index.js';
import type { PlanEdge } from './edgeSchema.js';
import type { RegionGround } from './measureRegions.js';

/** An edge line on both kernels; null on a kernel that the plan does not name. */
export interface MeasuredEdgeLine {
  readonly id: string;
  readonly soft: EdgeValue;
  readonly sharp: EdgeValue | null;
}

/** Measures the edge lines of a plan, each on the slices or on its oblique plane. */
export function measureEdges(
  edges: readonly PlanEdge[],
  { soft, sharp, storedOf, cuts, notOnSharp }: RegionGround,
): readonly MeasuredEdgeLine[] {
  const on = (stack: Stack, edge: PlanEdge): EdgeValue => {
    if (edge.plane === undefined)
      return measureEdgeLine(edge, stack, (sliceIndex) => storedOf(stack, sliceIndex));
    const cut = cuts.cutOf(edge.plane, stack);
    return cut.ok ? measureEdgeLineOnCut(edge, cut.value) : edgeNotMeasured(cut.refusal);
  };
  const onSharp = (stack: Stack, edge: PlanEdge): EdgeValue =>
    notOnSharp === undefined ? on(stack, edge) : edgeNotMeasured(notOnSharp);
  return edges.map((edge) => ({
    id: edge.id,
    soft: on(soft, edge),
    sharp: sharp === undefined ? null : onSharp(sharp, edge),
  }));
}

/** Slices of a stack that edge lines lie on. */
export function edgeSlices(edges: readonly PlanEdge[], stack: Stack): readonly number[] {
  return edges.flatMap((edge) => {
    const found = findLineSlice(edge, stack);
    return found.ok ? [found.value.sliceIndex] : [];
  });
}
