import { formatFixed, MINUS } from '../format/index.js';
import type { NotePlane } from '../note/planeSchema.js';
import type { Note } from '../note/schema.js';

/** A point in patient space, LPS: '(-6.00, -10.00, 2.00)'. With an ASCII minus sign, to be read by machines again. */
export function pointText(pointMm: readonly number[]): string {
  const parts = pointMm.map((part) => formatFixed(part, 2).replace(MINUS, '-'));
  return `(${parts.join(', ')})`;
}

/** Where a line runs: from, to and the width of its band; a line can be drawn again from it. */
export function lineText({
  fromMm,
  toMm,
  bandMm,
}: {
  readonly fromMm: readonly number[];
  readonly toMm: readonly number[];
  readonly bandMm: number;
}): string {
  return `from ${pointText(fromMm)} to ${pointText(toMm)} mm, band ${formatFixed(bandMm, 1)} mm`;
}

/** The oblique plane of a measurement: 'on Cut 1 (oblique, resampled by cubic convolution)'; empty on the slices. */
export function planeText(
  { planes }: Pick<Note, 'planes'>,
  { plane }: { readonly plane?: string },
): string {
  if (plane === undefined) return '';
  const cut = planes.find(({ id }) => id === plane);
  return cut === undefined
    ? 'on an oblique cut that the note does not have (resampled)'
    : `on ${cut.label} (oblique, resampled by ${resamplingOf(cut)})`;
}

/** How the values of a plane were made, in words. */
export function resamplingOf({ resampling }: Pick<NotePlane, 'resampling'>): string {
  return resampling === '' ? 'a method that is not told' : resampling;
}

/** Parts of a place in words, empty ones left out. */
export function joinedPlace(...parts: readonly string[]): string {
  return parts.filter((part) => part !== '').join('; ');
}
