/** A scale bar: its length in patient space and on the plate. */
export interface ScaleBar {
  readonly lengthMm: number;
  readonly lengthPx: number;
}

/**
 * The longest bar of a round length, 1, 2 or 5 times a power of ten mm, that is not longer than `longestPx`
 * on the plate; undefined without a scale.
 */
export function scaleBar(scalePxPerMm: number, longestPx: number): ScaleBar | undefined {
  const longestMm = longestPx / scalePxPerMm;
  if (!Number.isFinite(longestMm) || longestMm <= 0) return undefined;
  const power = 10 ** Math.floor(Math.log10(longestMm));
  const lengthMm = [5, 2, 1].map((step) => step * power).find((mm) => mm <= longestMm) ?? power;
  return { lengthMm, lengthPx: lengthMm * scalePxPerMm };
}
