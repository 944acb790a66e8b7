/** Counts of a region's pixels in bins that both kernels share. Bins are half-open; the last one holds its upper edge. */
export interface PairedHistogram {
  /** Lower edge of the first bin, HU. */
  readonly startHu: number;
  readonly binWidthHu: number;
  readonly soft: readonly number[];
  readonly sharp: readonly number[];
}

/** CT numbers are whole HU as a rule: bins finer than that would show a comb that is not in the patient. */
const LEAST_WIDTH_HU = 1;
/** More bars than that can't be told apart on the plot. */
const MOST_BINS = 200;

/**
 * Histogram of the same region on both kernels. Bin width by the Freedman–Diaconis rule over both kernels' pixels
 * together, 2·IQR/∛n (Freedman & Diaconis 1981, Z Wahrscheinlichkeitstheorie 57:453), bins spread evenly from the least
 * to the greatest value as numpy.histogram_bin_edges(bins='fd') does, but never finer than 1 HU and never more than 200.
 * When the IQR is zero, Sturges' rule ⌈log₂ n⌉ + 1 decides. One value only: one bin of 1 HU about it.
 * Either kernel may be empty; undefined when both are.
 * @throws when a value is not finite: padding has to be left out before.
 */
export function pairedHistogram(
  softHu: ArrayLike<number>,
  sharpHu: ArrayLike<number>,
): PairedHistogram | undefined {
  const sorted = new Float64Array(softHu.length + sharpHu.length);
  sorted.set(Float64Array.from(softHu), 0);
  sorted.set(Float64Array.from(sharpHu), softHu.length);
  const bad = sorted.find((value) => !Number.isFinite(value));
  if (bad !== undefined) throw new RangeError(`invalid HU in histogram: ${bad}`);
  sorted.sort();
  const least = sorted[0];
  const most = sorted[sorted.length - 1];
  if (least === undefined || most === undefined) return undefined;

  const range = most - least;
  const bins = range > 0 ? binCount(sorted, range) : 1;
  const startHu = range > 0 ? least : least - 0.5;
  const binWidthHu = range > 0 ? range / bins : 1;
  const count = (values: ArrayLike<number>) => countInBins(values, startHu, binWidthHu, bins);
  return { startHu, binWidthHu, soft: count(softHu), sharp: count(sharpHu) };
}

function binCount(sorted: Float64Array, range: number): number {
  const n = sorted.length;
  const width = (2 * (quantile(sorted, 0.75) - quantile(sorted, 0.25))) / Math.cbrt(n);
  const wanted = width > 0 ? Math.ceil(range / width) : Math.ceil(Math.log2(n)) + 1;
  const finest = Math.max(1, Math.ceil(range / LEAST_WIDTH_HU));
  return Math.min(wanted, finest, MOST_BINS);
}

/** Type 7 of Hyndman & Fan 1996 (Am Stat 50:361): linear between order statistics. */
function quantile(sorted: Float64Array, p: number): number {
  const at = (sorted.length - 1) * p;
  const low = Math.floor(at);
  const a = sorted[low] ?? 0;
  const b = sorted[Math.min(low + 1, sorted.length - 1)] ?? a;
  return a + (b - a) * (at - low);
}

function countInBins(
  values: ArrayLike<number>,
  startHu: number,
  widthHu: number,
  bins: number,
): number[] {
  const counts = new Array<number>(bins).fill(0);
  for (let i = 0; i < values.length; i++) {
    const value = values[i] ?? 0;
    let bin = Math.min(bins - 1, Math.max(0, Math.floor((value - startHu) / widthHu)));
    // The division can round across an edge; the edges themselves decide.
    if (value < startHu + bin * widthHu && bin > 0) bin--;
    else if (value >= startHu + (bin + 1) * widthHu && bin < bins - 1) bin++;
    counts[bin] = (counts[bin] ?? 0) + 1;
  }
  return counts;
}
