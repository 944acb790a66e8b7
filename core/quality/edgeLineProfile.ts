import type { EdgeSamples, FittedEdge } from './fitEdge.js';

/** Mean of the pixels at one distance from an edge. */
export interface ProfilePoint {
  /** Distance from the edge, mm; positive behind it. */
  readonly mm: number;
  readonly hu: number;
  readonly n: number;
  /** Sum of the squared differences from that mean, HU². */
  readonly squaresHu2: number;
}

/** Steps of a profile follow the blur, within these bounds, mm. */
const STEP_MM = [0.1, 0.4] as const;
const STEPS_PER_SIGMA = 3;

/** The profile across an edge: each pixel at its own distance from the fitted curve, gathered in narrow steps. */
export function binnedProfile(
  { acrossMm, alongMm, hu }: EdgeSamples,
  { offsetMm, slope, curvaturePerMm, sigmaMm }: FittedEdge,
): readonly ProfilePoint[] {
  const stepMm = Math.min(STEP_MM[1], Math.max(STEP_MM[0], sigmaMm / STEPS_PER_SIGMA));
  const sums = new Map<number, { t: number; hu: number; squares: number; n: number }>();
  hu.forEach((value, index) => {
    const s = alongMm[index] as number;
    const t = (acrossMm[index] as number) - offsetMm - slope * s - curvaturePerMm * s * s;
    const bin = Math.round(t / stepMm);
    const sum = sums.get(bin) ?? { t: 0, hu: 0, squares: 0, n: 0 };
    sums.set(bin, {
      t: sum.t + t,
      hu: sum.hu + value,
      squares: sum.squares + value * value,
      n: sum.n + 1,
    });
  });
  return [...sums]
    .sort(([a], [b]) => a - b)
    .map(([, sum]) => ({
      mm: sum.t / sum.n,
      hu: sum.hu / sum.n,
      n: sum.n,
      squaresHu2: Math.max(0, sum.squares - (sum.hu * sum.hu) / sum.n),
    }));
}

/** SD of pixels about the mean at their distance, HU: the noise, whatever shape the profile has. */
export function scatterHu(profile: readonly ProfilePoint[]): number {
  let [squares, free] = [0, 0];
  for (const { n, squaresHu2 } of profile) {
    squares += squaresHu2;
    free += n - 1;
  }
  return free > 0 ? Math.sqrt(squares / free) : 0;
}

/** A point of the profile that noise moves by more than this part of the step tells no crossing. */
const MOST_NOISE = 0.04;

/**
 * Distance between the places where the profile crosses 10 and 90 % of the step, nearest to the edge, straight lines
 * between its points; undefined where it doesn't, or where noise is too large to tell.
 */
export function crossingsMm(
  profile: readonly ProfilePoint[],
  { lowHu, stepHu, sigmaMm, residualHu }: FittedEdge,
): number | undefined {
  const near = profile.filter(({ mm }) => Math.abs(mm) <= 4 * sigmaMm);
  const pixels = near.reduce((sum, { n }) => sum + n, 0) / Math.max(near.length, 1);
  if (!(residualHu / Math.sqrt(Math.max(pixels, 1)) <= MOST_NOISE * Math.abs(stepHu)))
    return undefined;
  const shares = near.map(({ mm, hu }) => ({ mm, share: (hu - lowHu) / stepHu }));
  const crossing = (level: number, up: boolean): number | undefined => {
    const inward = up ? shares.filter(({ mm }) => mm >= -sigmaMm) : reversed(shares, sigmaMm);
    for (let index = 1; index < inward.length; index += 1) {
      const [a, b] = [inward[index - 1], inward[index]];
      if (a === undefined || b === undefined) continue;
      if (up ? a.share < level && b.share >= level : a.share > level && b.share <= level)
        return a.mm + ((b.mm - a.mm) * (level - a.share)) / (b.share - a.share);
    }
    return undefined;
  };
  const [high, low] = [crossing(0.9, true), crossing(0.1, false)];
  return high === undefined || low === undefined ? undefined : high - low;
}

interface Share {
  readonly mm: number;
  readonly share: number;
}

function reversed(shares: readonly Share[], sigmaMm: number): readonly Share[] {
  return shares.filter(({ mm }) => mm <= sigmaMm).toReversed();
}
