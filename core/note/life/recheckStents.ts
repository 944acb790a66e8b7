import type { MeasuredPlan } from '../measurePlan.js';
import type { Note } from '../schema.js';
import type { StentValue } from '../stentSchema.js';
import type { ChangedNumber } from './recheck.js';
import { isSameNumber } from './sameNumber.js';

/** What recomputing may alter: a fit ends when a step gains nothing, so its last digits are the machine's. */
const RELATIVE_ROUNDING = 1e-6;

const ESTIMATES = [
  'strutDiameterMm',
  'lumenHu',
  'wallWidthMm',
  'wallHu',
  'strutMassHuMm',
  'blurSigmaMm',
] as const;

const AXES = ['x', 'y', 'z'] as const;

/** A number of a fit; which kernel it is of, and its name. */
interface FitNumber {
  readonly kernel: ChangedNumber['kernel'];
  readonly quantity: string;
  readonly value: number | null;
}

/**
 * Every number of a note's fitted stents that a fresh fit does not give again, in the note's order. Standard errors by
 * refits are compared only where the fresh fit has them too: they are made on demand.
 */
export function changedStentNumbers(
  { stents }: Pick<Note, 'stents'>,
  measured: Pick<MeasuredPlan, 'stents'>,
): readonly ChangedNumber[] {
  return stents.flatMap(({ id, label, fit }) => {
    if (fit === null) return [];
    const fresh = measured.stents.find((one) => one.id === id) ?? null;
    const now = new Map(
      fresh === null ? [] : numbersOf(fresh).map((one) => [keyOf(one), one.value] as const),
    );
    return numbersOf(fit).flatMap((one): readonly ChangedNumber[] => {
      const { kernel, quantity, value: before } = one;
      const again = now.get(keyOf(one)) ?? null;
      const isOnDemand = quantity.startsWith('refitted.');
      if (isOnDemand && (fresh === null || fresh.refitted === null)) return [];
      if (isSameNumber(before, again, RELATIVE_ROUNDING)) return [];
      const sopInstanceUid =
        fit.images.find((image) => image.kernel === kernel)?.sopInstanceUid ?? null;
      return [{ id, label, kernel, quantity, before, now: again, sopInstanceUid }];
    });
  });
}

function keyOf({ kernel, quantity }: FitNumber): string {
  return `${kernel} ${quantity}`;
}

function numbersOf(fit: Omit<StentValue, 'reason'>): readonly FitNumber[] {
  const both = (quantity: string, value: number | null | undefined): FitNumber => ({
    kernel: 'both',
    quantity,
    value: value ?? null,
  });
  const noiseOf = (kernel: 'soft' | 'sharp') =>
    fit.images.find((image) => image.kernel === kernel)?.noiseSdHu ?? null;
  return [
    ...ESTIMATES.flatMap((name) => [
      both(name, fit[name]?.value),
      both(`${name}.se`, fit[name]?.se),
    ]),
    both('refitted.strutDiameterMm', fit.refitted?.strutDiameterMm),
    both('refitted.lumenHu', fit.refitted?.lumenHu),
    ...AXES.flatMap((axis, index) => [
      both(`axisMm.${axis}`, fit.axisMm?.[index]),
      both(`axis.${axis}`, fit.axis?.[index]),
    ]),
    both('tiltDeg', fit.tiltDeg),
    both('chiSquare', fit.goodness?.chiSquare),
    both('degreesOfFreedom', fit.goodness?.degreesOfFreedom),
    both('slices', fit.slices),
    both('plain.radiusMm', fit.plain?.radiusMm),
    { kernel: 'soft', quantity: 'plain.softHu', value: fit.plain?.softHu ?? null },
    { kernel: 'sharp', quantity: 'plain.sharpHu', value: fit.plain?.sharpHu ?? null },
    { kernel: 'soft', quantity: 'noiseSdHu', value: noiseOf('soft') },
    { kernel: 'sharp', quantity: 'noiseSdHu', value: noiseOf('sharp') },
  ];
}
