import { normalCdf } from './normalCdf.js';

/** Pixels around an edge: t across it and s along it, mm from the middle, with their values in HU. */
export interface EdgeSamples {
  readonly acrossMm: Float64Array;
  readonly alongMm: Float64Array;
  readonly hu: Float64Array;
}

/** A step blurred by a Gaussian, along the curve t = offset + slope·s + curvature·s². */
export interface FittedEdge {
  /** Level on the side of negative t. */
  readonly lowHu: number;
  /** What the other side is higher by. */
  readonly stepHu: number;
  readonly offsetMm: number;
  readonly slope: number;
  readonly curvaturePerMm: number;
  readonly sigmaMm: number;
  /** Root mean square of what the edge doesn't explain. */
  readonly residualHu: number;
}

const PARAMETERS = 6;
const MOST_STEPS = 25;
/** 1/√(2π). */
const ROOT_OF_TAU_INVERTED = 1 / Math.sqrt(2 * Math.PI);

/**
 * Least-squares fit of HU = low + step·Φ((t − offset − slope·s − curvature·s²)/σ) by the method of Levenberg 1944
 * and Marquardt 1963 (doi 10.1137/0111030). Undefined when it comes to no edge: too few pixels, no convergence.
 */
export function fitEdge(
  samples: EdgeSamples,
  start: { readonly lowHu: number; readonly stepHu: number; readonly sigmaMm: number },
): FittedEdge | undefined {
  const count = samples.hu.length;
  if (count < 4 * PARAMETERS) return undefined;
  let point: readonly number[] = [start.lowHu, start.stepHu, 0, 0, 0, Math.log(start.sigmaMm)];
  let equations = normalEquations(samples, point);
  let damping = 1e-3;
  for (let step = 0; step < MOST_STEPS; step += 1) {
    const change = solveDamped(equations, damping);
    if (change === undefined) return undefined;
    const tried = point.map((value, k) => value + (change[k] ?? 0));
    const next = normalEquations(samples, tried);
    if (!(next.squares <= equations.squares)) {
      damping *= 10;
      if (damping > 1e8) return undefined;
      continue;
    }
    const gained = equations.squares - next.squares;
    point = tried;
    equations = next;
    damping = Math.max(1e-9, damping / 10);
    if (gained <= 1e-5 * equations.squares + 1e-12) return asEdge(point, equations.squares, count);
  }
  return undefined;
}

function asEdge(point: readonly number[], squares: number, count: number): FittedEdge {
  const [lowHu = 0, stepHu = 0, offsetMm = 0, slope = 0, curvaturePerMm = 0, logSigma = 0] = point;
  const residualHu = Math.sqrt(squares / (count - PARAMETERS));
  return {
    lowHu,
    stepHu,
    offsetMm,
    slope,
    curvaturePerMm,
    sigmaMm: Math.exp(logSigma),
    residualHu,
  };
}

interface NormalEquations {
  /** JᵀJ, its rows up to the diagonal. */
  readonly matrix: readonly (readonly number[])[];
  /** Jᵀ(measured − model). */
  readonly gradient: readonly number[];
  readonly squares: number;
}

function normalEquations(
  { acrossMm, alongMm, hu }: EdgeSamples,
  point: readonly number[],
): NormalEquations {
  const [low = 0, step = 0, offset = 0, slope = 0, curvature = 0, logSigma = 0] = point;
  const sigma = Math.exp(logSigma);
  // Derivatives: 1, r = Φ, d = −step·φ/σ, d·s, d·s², q = d·z·σ. Each sum has a name: the loop is the whole cost.
  const n = hu.length;
  let [squares, r1, rr, d1, ds, dss, q1, rd, rds, rdss, rq] = [0, 0, 0, 0, 0, 0, 0, 0, 0, 0, 0];
  let [dd, dds, ddss, ddsss, ddssss, dq, dqs, dqss, qq] = [0, 0, 0, 0, 0, 0, 0, 0, 0];
  let [e1, re, de, dse, dsse, qe] = [0, 0, 0, 0, 0, 0];
  for (let index = 0; index < n; index += 1) {
    const s = alongMm[index] as number;
    const z = ((acrossMm[index] as number) - offset - slope * s - curvature * s * s) / sigma;
    const gaussian = Math.exp(-0.5 * z * z);
    const r = normalCdf(z, gaussian);
    const d = -(step * ROOT_OF_TAU_INVERTED * gaussian) / sigma;
    const e = (hu[index] as number) - low - step * r;
    const q = d * z * sigma;
    const ss = s * s;
    squares += e * e;
    e1 += e;
    re += r * e;
    de += d * e;
    dse += d * s * e;
    dsse += d * ss * e;
    qe += q * e;
    r1 += r;
    rr += r * r;
    d1 += d;
    ds += d * s;
    dss += d * ss;
    q1 += q;
    rd += r * d;
    rds += r * d * s;
    rdss += r * d * ss;
    rq += r * q;
    dd += d * d;
    dds += d * d * s;
    ddss += d * d * ss;
    ddsss += d * d * ss * s;
    ddssss += d * d * ss * ss;
    dq += d * q;
    dqs += d * q * s;
    dqss += d * q * ss;
    qq += q * q;
  }
  return {
    matrix: [
      [n],
      [r1, rr],
      [d1, rd, dd],
      [ds, rds, dds, ddss],
      [dss, rdss, ddss, ddsss, ddssss],
      [q1, rq, dq, dqs, dqss, qq],
    ],
    gradient: [e1, re, de, dse, dsse, qe],
    squares,
  };
}

/** (JᵀJ + λ·diag JᵀJ)·x = Jᵀr by Cholesky's method; undefined where the matrix is not positive. */
function solveDamped(
  { matrix, gradient }: NormalEquations,
  damping: number,
): Float64Array | undefined {
  const n = PARAMETERS;
  const lower = new Float64Array(n * n);
  const x = new Float64Array(n);
  const at = (row: number, column: number): number => lower[row * n + column] as number;
  for (let row = 0; row < n; row += 1) {
    for (let column = 0; column <= row; column += 1) {
      let sum = matrix[row]?.[column] ?? 0;
      if (row === column) sum *= 1 + damping;
      for (let k = 0; k < column; k += 1) sum -= at(row, k) * at(column, k);
      if (row !== column) lower[row * n + column] = sum / at(column, column);
      else if (sum > 0) lower[row * n + row] = Math.sqrt(sum);
      else return undefined;
    }
  }
  for (let row = 0; row < n; row += 1) {
    let sum = gradient[row] as number;
    for (let k = 0; k < row; k += 1) sum -= at(row, k) * (x[k] as number);
    x[row] = sum / at(row, row);
  }
  for (let row = n - 1; row >= 0; row -= 1) {
    let sum = x[row] as number;
    for (let k = row + 1; k < n; k += 1) sum -= at(k, row) * (x[k] as number);
    x[row] = sum / at(row, row);
  }
  return x;
}
