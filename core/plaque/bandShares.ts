import type { BandTable } from './bandTable.js';

/** How much of a region lies in each band. */
export interface BandShares {
  /** Pixels in each band of the table, in its order. */
  readonly pixels: readonly number[];
  /** Pixels below the table's lower edge: in no band. */
  readonly unassigned: number;
  /** All pixels of the region, padding left out. */
  readonly n: number;
  readonly pixelAreaMm2: number;
}

/**
 * Counts a region's pixels by band. Published edges are whole CT numbers (75 | 76); a value between two of them
 * counts to the upper band, since it is above the edge of the lower one.
 *
 * @param values HU, padding left out
 * @throws when a value is not finite: padding has to be left out before
 */
export function bandShares(
  values: ArrayLike<number>,
  { fromHu, bands }: BandTable,
  pixelAreaMm2: number,
): BandShares {
  const pixels = bands.map(() => 0);
  let unassigned = 0;
  for (let index = 0; index < values.length; index += 1) {
    const hu = values[index] as number;
    if (!Number.isFinite(hu)) throw new RangeError(`invalid HU in bands: ${hu}`);
    const band =
      fromHu !== null && hu < fromHu
        ? -1
        : bands.findIndex(({ toHu }) => toHu === null || hu <= toHu);
    if (band < 0) unassigned += 1;
    else pixels[band] = (pixels[band] ?? 0) + 1;
  }
  return { pixels, unassigned, n: values.length, pixelAreaMm2 };
}

/** Share of a band in the region's area, 0 to 1; undefined for a region without pixels. */
export function bandShare({ pixels, n }: BandShares, band: number): number | undefined {
  return n === 0 ? undefined : (pixels[band] ?? 0) / n;
}
