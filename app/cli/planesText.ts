import { formatQuantity } from '../../core/format/index.js';
import type { MeasuredPlan } from '../../core/note/index.js';

/** Oblique planes for people, a sentence each: how they were cut, from which slices, or that they could not be. */
export function planesText(planes: NonNullable<MeasuredPlan['planes']>): readonly string[] {
  return planes.map(({ id, facts }) => {
    if (facts === null) return `${id}: the oblique plane could not be cut.`;
    const { angleDeg, resampling, source } = facts;
    const angle =
      angleDeg === null ? '' : `, ${formatQuantity(angleDeg, 'angleDeg')}° to the slices`;
    const slices = [['soft', source.soft] as const, ['sharp', source.sharp] as const].flatMap(
      ([kernel, of]) =>
        of === null
          ? []
          : [`${kernel} slices ${of.first.sliceIndex + 1} to ${of.last.sliceIndex + 1}`],
    );
    return `${id}: oblique plane, resampled by ${[resampling + angle, ...slices].join('; ')}.`;
  });
}
