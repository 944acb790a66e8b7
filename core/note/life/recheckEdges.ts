import type { MeasuredPlan } from '../measurePlan.js';
import type { Kernel, Note } from '../schema.js';
import type { ChangedNumber } from './recheck.js';
import { isSameNumber } from './sameNumber.js';

/** What recomputing may alter: the fit ends when a step gains nothing, so its last digits are the machine's. */
const RELATIVE_ROUNDING = 1e-6;

const QUANTITIES = [
  'riseMm',
  'riseErrorMm',
  'crossingsMm',
  'blurFwhmMm',
  'blurErrorMm',
  'fromHu',
  'toHu',
  'atMm',
  'n',
] as const;

/** Every number of a note's edge lines that a fresh measurement does not give again, in the note's order. */
export function changedEdgeNumbers(
  { edges, pair }: Pick<Note, 'edges' | 'pair'>,
  measured: MeasuredPlan,
): readonly ChangedNumber[] {
  const kernels: readonly Kernel[] = pair.sharp === null ? ['soft'] : ['soft', 'sharp'];
  return edges.flatMap((edge) =>
    kernels.flatMap((kernel) => {
      const kept = edge[kernel];
      const fresh = measured.edges?.find(({ id }) => id === edge.id)?.[kernel] ?? null;
      if (kept === null) return [];
      return QUANTITIES.flatMap((quantity): readonly ChangedNumber[] => {
        const [before, now] = [kept[quantity], fresh?.[quantity] ?? null];
        if (isSameNumber(before, now, RELATIVE_ROUNDING)) return [];
        const { id, label } = edge;
        return [{ id, label, kernel, quantity, before, now, sopInstanceUid: kept.sopInstanceUid }];
      });
    }),
  );
}
