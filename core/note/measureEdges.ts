import {
  type EdgeValue,
  edgeNotMeasured,
  type Flag,
  findLineSlice,
  measureEdgeLine,
} from '../region/index.js';
import type { Stack } from '../stack/index.js';
import type { PlanEdge } from './edgeSchema.js';
import type { StackStoredOf } from './measurePlan.js';

/** An edge line on both kernels; null on a kernel that the plan does not name. */
export interface MeasuredEdgeLine {
  readonly id: string;
  readonly soft: EdgeValue;
  readonly sharp: EdgeValue | null;
}

/** Measures the edge lines of a plan; `notOnSharp` says why nothing may be measured on the sharp stack. */
export function measureEdges(
  edges: readonly PlanEdge[],
  soft: Stack,
  sharp: Stack | undefined,
  storedOf: StackStoredOf,
  notOnSharp?: Flag,
): readonly MeasuredEdgeLine[] {
  const on = (stack: Stack, edge: PlanEdge): EdgeValue =>
    measureEdgeLine(edge, stack, (sliceIndex) => storedOf(stack, sliceIndex));
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
