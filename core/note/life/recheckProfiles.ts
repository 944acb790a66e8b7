import type { MeasuredPlan } from '../measurePlan.js';
import type { NoteProfileValue } from '../profileSchema.js';
import type { Kernel, Note } from '../schema.js';
import type { ChangedNumber } from './recheck.js';
import { isSameNumber } from './sameNumber.js';

/** What recomputing may alter, as for edge lines. */
const RELATIVE_ROUNDING = 1e-6;

type Numbers = Pick<NoteProfileValue, 'struts' | 'halfHeightMm' | (typeof QUANTITIES)[number]>;

const QUANTITIES = [
  'visibleWidthMm',
  'peakDistanceMm',
  'strutWidthMm',
  'riseMm',
  'lumenHu',
  'narrowing',
] as const;

/** Every number of a note's profiles that a fresh measurement does not give again, in the note's order. */
export function changedProfileNumbers(
  { profiles, pair }: Pick<Note, 'profiles' | 'pair'>,
  measured: Pick<MeasuredPlan, 'profiles'>,
): readonly ChangedNumber[] {
  const kernels: readonly Kernel[] = pair.sharp === null ? ['soft'] : ['soft', 'sharp'];
  return profiles.flatMap(({ id, label, ...values }) =>
    kernels.flatMap((kernel) => {
      const kept = values[kernel];
      if (kept === null) return [];
      const { sopInstanceUid } = kept;
      const fresh = measured.profiles.find((one) => one.id === id)?.[kernel] ?? null;
      const now = new Map(fresh === null ? [] : numbersOf(fresh));
      return numbersOf(kept).flatMap(([quantity, before]): readonly ChangedNumber[] => {
        const again = now.get(quantity) ?? null;
        return isSameNumber(before, again, RELATIVE_ROUNDING)
          ? []
          : [{ id, label, kernel, quantity, before, now: again, sopInstanceUid }];
      });
    }),
  );
}

/** All numbers of a value under their names, those of both struts and both half heights always among them. */
function numbersOf(of: Numbers): readonly (readonly [quantity: string, value: number | null])[] {
  return [
    ...QUANTITIES.map((quantity) => [quantity, of[quantity]] as const),
    ...([0, 1] as const).flatMap((index) => [
      [`struts[${index}].atMm`, of.struts[index]?.atMm ?? null] as const,
      [`struts[${index}].peakHu`, of.struts[index]?.peakHu ?? null] as const,
      [`halfHeightMm[${index}]`, of.halfHeightMm?.[index] ?? null] as const,
    ]),
  ];
}
