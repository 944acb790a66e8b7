import { makeFft } from './fft.js';
import type { KernelTexture } from './kernelTexture.js';
import { powerAt } from './powerAt.js';

/** A run of neighbouring pixels of one row: from the first column to before the end. */
export interface PixelRun {
  readonly row: number;
  readonly from: number;
  readonly end: number;
}

/**
 * Sums of the autocovariance of a noise over pairs of pixels. For each distance between rows it holds a function of
 * the distance between columns whose second difference is the autocovariance; four of its values then give the sum
 * over all pairs of pixels of two runs.
 */
export interface CovarianceSums {
  /** Pixels further apart than this, either way, are not told. */
  readonly reach: number;
  /** Rows 0 … reach, columns 0 … reach + 1; even in both. */
  readonly second: Float64Array;
}

/**
 * The sums from an autocovariance, HU², that is even both ways.
 *
 * @param covariance by rows and columns apart, from 0 to `reach`
 */
export function covarianceSums(
  reach: number,
  covariance: (rows: number, columns: number) => number,
): CovarianceSums {
  const width = reach + 2;
  const second = new Float64Array((reach + 1) * width);
  for (let rows = 0; rows <= reach; rows += 1) {
    const start = rows * width;
    second[start + 1] = covariance(rows, 0) / 2;
    for (let columns = 1; columns <= reach; columns += 1) {
      const at = start + columns;
      second[at + 1] =
        2 * (second[at] as number) - (second[at - 1] as number) + covariance(rows, columns);
    }
  }
  return { reach, second };
}

/**
 * ΣΣ of the autocovariance over all pairs of pixels of a region, HU²: n² times the variance of its mean. Undefined
 * where the region is wider than the sums reach.
 */
export function summedCovariance(
  runs: readonly PixelRun[],
  { reach, second }: CovarianceSums,
): number | undefined {
  const width = reach + 2;
  let sum = 0;
  for (let i = 0; i < runs.length; i += 1) {
    const a = runs[i] as PixelRun;
    for (let j = 0; j <= i; j += 1) {
      const b = runs[j] as PixelRun;
      const rows = Math.abs(a.row - b.row);
      const apart = Math.max(Math.abs(b.end - a.from), Math.abs(a.end - b.from));
      if (rows > reach || apart > reach + 1) return undefined;
      const start = rows * width;
      const pair =
        (second[start + Math.abs(b.end - a.from)] as number) -
        (second[start + Math.abs(b.end - a.end)] as number) -
        (second[start + Math.abs(b.from - a.from)] as number) +
        (second[start + Math.abs(b.from - a.end)] as number);
      sum += i === j ? pair : 2 * pair;
    }
  }
  return sum;
}

/** Pixels across the largest lattice on which an autocorrelation is told; a region may be half as wide. */
const MOST_LATTICE = 512;
const LEAST_LATTICE = 128;

const KNOWN = new WeakMap<KernelTexture, Map<string, CovarianceSums>>();

/**
 * Sums of the autocovariance that noise of a texture has on a grid: the transform of its power spectrum (Wiener and
 * Khinchin). Made once for a texture, a spacing and a size. Undefined for regions wider than 256 pixels.
 *
 * @param pixels widest side of the region
 */
export function textureCovariance(
  texture: KernelTexture,
  spacingMm: readonly [number, number],
  pixels: number,
): CovarianceSums | undefined {
  const lattice = Math.max(LEAST_LATTICE, 2 ** Math.ceil(Math.log2(2 * pixels)));
  if (lattice > MOST_LATTICE) return undefined;
  const all = KNOWN.get(texture) ?? new Map<string, CovarianceSums>();
  KNOWN.set(texture, all);
  const key = [lattice, ...spacingMm].join();
  const known = all.get(key);
  if (known !== undefined) return known;
  const half = lattice / 2;
  const covariance = transformed(texture, spacingMm, lattice);
  const made = covarianceSums(
    half,
    (rows, columns) => covariance[rows * (half + 1) + columns] as number,
  );
  all.set(key, made);
  return made;
}

/** The autocovariance for 0 … lattice/2 rows and columns apart. */
function transformed(
  texture: KernelTexture,
  spacingMm: readonly [number, number],
  lattice: number,
): Float64Array {
  const half = lattice / 2;
  const width = half + 1;
  const steps = [1 / (lattice * spacingMm[0]), 1 / (lattice * spacingMm[1])] as const;
  const fft = makeFft(lattice);
  const re = new Float64Array(lattice);
  const im = new Float64Array(lattice);
  const power = powerOnLattice(texture, steps, half);
  const halfway = new Float64Array(width * width);
  const fold = (list: (index: number) => number, keep: (index: number, value: number) => void) => {
    im.fill(0);
    for (let index = 0; index < lattice; index += 1)
      re[index] = list(index <= half ? index : lattice - index);
    fft.forward(re, im);
    for (let index = 0; index <= half; index += 1) keep(index, re[index] as number);
  };
  for (let row = 0; row <= half; row += 1)
    fold(
      (column) => power[row * width + column] as number,
      (column, value) => {
        halfway[row * width + column] = value;
      },
    );
  const covariance = new Float64Array(width * width);
  const cell = steps[0] * steps[1];
  for (let column = 0; column <= half; column += 1)
    fold(
      (row) => halfway[row * width + column] as number,
      (row, value) => {
        covariance[row * width + column] = value * cell;
      },
    );
  return covariance;
}

/**
 * Power at the places of one quarter of the lattice. The corners beyond the last ring hold what is left of the
 * variance, so that a single pixel has the SD that was measured, but no more than the last ring.
 */
function powerOnLattice(
  texture: KernelTexture,
  steps: readonly [number, number],
  half: number,
): Float64Array {
  const width = half + 1;
  const last = texture.frequencyPerMm.at(-1) ?? 0;
  const power = new Float64Array(width * width);
  let inside = 0;
  let corners = 0;
  // Places on the axes and on the highest frequency stand once or twice in the lattice, the others four times.
  const times = (index: number): number => (index === 0 || index === half ? 1 : 2);
  for (let row = 0; row <= half; row += 1)
    for (let column = 0; column <= half; column += 1) {
      const frequency = Math.hypot(column * steps[0], row * steps[1]);
      const count = times(row) * times(column);
      if (frequency > last) corners += count;
      else {
        const value = powerAt(texture, frequency);
        power[row * width + column] = value;
        inside += count * value;
      }
    }
  const left = texture.noiseSdHu ** 2 / (steps[0] * steps[1]) - inside;
  const corner = Math.min(texture.powerHu2Mm2.at(-1) ?? 0, Math.max(0, left / corners));
  for (let row = 0; row <= half; row += 1)
    for (let column = 0; column <= half; column += 1)
      if (Math.hypot(column * steps[0], row * steps[1]) > last)
        power[row * width + column] = corner;
  return power;
}
