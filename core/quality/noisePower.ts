import { type Fft, makeFft } from './fft.js';

/** A two-dimensional noise power spectrum on the lattice of the discrete transform. */
export interface NoisePower {
  /** Lattice: powers of two, at least the size of the area. */
  readonly columns: number;
  readonly rows: number;
  /** Step of the lattice along x and y, per mm: 1/(columns·Δx), 1/(rows·Δy). */
  readonly stepPerMm: readonly [number, number];
  /** HU²mm², row after row, in the order of the discrete transform: 0, Δu, … , −Δu. */
  readonly values: Float64Array;
}

/**
 * Noise power spectrum of one area, NPS(u,v) = ΔxΔy/(NxNy)·|DFT₂(values)|² (AAPM report 233, 2019; IAEA handbook of
 * diagnostic radiology physics, 2014, eq. 4.42). Give it what {@link detrendQuadratic} left. An area whose sides are
 * no powers of two is surrounded by zeros up to `least` or the next power: the lattice grows finer, the resolution
 * stays 1/(NxΔx), and ΣNPS·Δu·Δv is still the mean square of the values (Parseval).
 *
 * @param spacingMm Δx between columns, Δy between rows
 * @param least smallest lattice that is wanted
 */
export function noisePower(
  values: Float64Array,
  columns: number,
  rows: number,
  spacingMm: readonly [number, number],
  least: readonly [number, number] = [1, 1],
): NoisePower {
  if (values.length !== columns * rows)
    throw new RangeError(`invalid rectangle: ${values.length} values, ${columns} × ${rows}`);
  const wide = latticeSize(Math.max(columns, least[0]));
  const high = latticeSize(Math.max(rows, least[1]));
  const re = new Float64Array(wide * high);
  const im = new Float64Array(wide * high);
  for (let row = 0; row < rows; row += 1)
    re.set(values.subarray(row * columns, (row + 1) * columns), row * wide);
  transformRows(re, im, wide, rows);
  transformColumns(re, im, wide, high);
  const scale = (spacingMm[0] * spacingMm[1]) / (columns * rows);
  return {
    columns: wide,
    rows: high,
    stepPerMm: [1 / (wide * spacingMm[0]), 1 / (high * spacingMm[1])],
    values: squares(re, im, wide, high, scale),
  };
}

/** Squares of the transform. That of real values is the same at (−u, −v): half of its columns are enough. */
function squares(
  re: Float64Array,
  im: Float64Array,
  wide: number,
  high: number,
  scale: number,
): Float64Array {
  const values = new Float64Array(wide * high);
  for (let row = 0; row < high; row += 1) {
    const mirrored = (high - row) % high;
    for (let column = 0; column <= wide >> 1; column += 1) {
      const at = row * wide + column;
      const value = scale * ((re[at] as number) ** 2 + (im[at] as number) ** 2);
      values[at] = value;
      values[mirrored * wide + ((wide - column) % wide)] = value;
    }
  }
  return values;
}

/** The smallest power of two that is not below `count`. */
export function latticeSize(count: number): number {
  return 2 ** Math.ceil(Math.log2(count));
}

const TRANSFORMS = new Map<number, Fft>();

function transformOf(size: number): Fft {
  const known = TRANSFORMS.get(size);
  if (known !== undefined) return known;
  const made = makeFft(size);
  TRANSFORMS.set(size, made);
  return made;
}

/** The rows below hold zeros alone and stay as they are. */
function transformRows(re: Float64Array, im: Float64Array, wide: number, rows: number): void {
  const fft = transformOf(wide);
  for (let row = 0; row < rows; row += 1)
    fft.forward(
      re.subarray(row * wide, (row + 1) * wide),
      im.subarray(row * wide, (row + 1) * wide),
    );
}

/** Columns of frequencies from 0 to the highest; the others mirror them. */
function transformColumns(re: Float64Array, im: Float64Array, wide: number, high: number): void {
  const fft = transformOf(high);
  const lineRe = new Float64Array(high);
  const lineIm = new Float64Array(high);
  for (let column = 0; column <= wide >> 1; column += 1) {
    for (let row = 0; row < high; row += 1) {
      lineRe[row] = re[row * wide + column] ?? 0;
      lineIm[row] = im[row * wide + column] ?? 0;
    }
    fft.forward(lineRe, lineIm);
    for (let row = 0; row < high; row += 1) {
      re[row * wide + column] = lineRe[row] ?? 0;
      im[row * wide + column] = lineIm[row] ?? 0;
    }
  }
}
