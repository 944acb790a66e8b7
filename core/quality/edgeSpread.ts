import type { EdgeSamples, FittedEdge } from './fitEdge.js';

/** Width of the steps across the edge in which pixels are gathered: a few to a pixel, mm. */
export const SPREAD_STEP_MM = 0.1;

/** Sums over steps across an edge, each edge scaled to rise from 0 to 1. */
export interface EdgeSums {
  readonly reachMm: number;
  readonly weight: Float64Array;
  /** Σ weight·t and Σ weight·(share of the step): their quotients are points of the edge spread. */
  readonly across: Float64Array;
  readonly share: Float64Array;
}

/**
 * The edge spread of one edge: each pixel at its own sub-pixel distance from the fitted curve, so that a slanted
 * edge is sampled more finely than the pixels lie. Weighted with the square of the step: what counts is noise
 * relative to it.
 */
export function edgeSums(samples: EdgeSamples, edge: FittedEdge, reachMm: number): EdgeSums {
  const count = 2 * Math.round(reachMm / SPREAD_STEP_MM) + 1;
  const weight = new Float64Array(count);
  const across = new Float64Array(count);
  const share = new Float64Array(count);
  const w = edge.stepHu * edge.stepHu;
  for (let index = 0; index < samples.hu.length; index += 1) {
    const s = samples.alongMm[index] ?? 0;
    const t =
      (samples.acrossMm[index] ?? 0) - edge.offsetMm - edge.slope * s - edge.curvaturePerMm * s * s;
    const bin = Math.round((t + reachMm) / SPREAD_STEP_MM);
    if (bin < 0 || bin >= count) continue;
    weight[bin] = (weight[bin] ?? 0) + w;
    across[bin] = (across[bin] ?? 0) + w * t;
    share[bin] = (share[bin] ?? 0) + (w * ((samples.hu[index] ?? 0) - edge.lowHu)) / edge.stepHu;
  }
  return { reachMm, weight, across, share };
}

/** Sums of several edges added up, without the edge `leftOut` where one is named. */
export function addEdges(all: readonly EdgeSums[], leftOut = -1): EdgeSums {
  const [first] = all;
  if (first === undefined) throw new RangeError('no edge sums to add');
  const total = (part: (one: EdgeSums) => Float64Array): Float64Array => {
    const sums = new Float64Array(first.weight.length);
    all.forEach((one, index) => {
      if (index === leftOut) return;
      const values = part(one);
      for (let bin = 0; bin < sums.length; bin += 1)
        sums[bin] = (sums[bin] ?? 0) + (values[bin] ?? 0);
    });
    return sums;
  };
  return {
    reachMm: first.reachMm,
    weight: total((one) => one.weight),
    across: total((one) => one.across),
    share: total((one) => one.share),
  };
}

/**
 * The distance over which an edge spread rises from 10 to 90 %, mm: straight lines between its points, the crossings
 * nearest to the middle on either side. A Gaussian blur has 2.563103 σ. Undefined where it doesn't cross both.
 */
export function riseDistanceMm({ weight, across, share }: EdgeSums): number | undefined {
  const points: { readonly t: number; readonly v: number }[] = [];
  weight.forEach((w, bin) => {
    if (w > 0) points.push({ t: (across[bin] ?? 0) / w, v: (share[bin] ?? 0) / w });
  });
  const middle = points.findIndex(({ t }) => t >= 0);
  if (middle < 0) return undefined;
  const above = crossing(points.slice(middle > 0 ? middle - 1 : 0), 0.9);
  const below = crossing(
    points
      .slice(0, middle + 1)
      .toReversed()
      .map(({ t, v }) => ({ t: -t, v: 1 - v })),
    0.9,
  );
  return above === undefined || below === undefined ? undefined : above + below;
}

function crossing(
  points: readonly { readonly t: number; readonly v: number }[],
  level: number,
): number | undefined {
  for (let index = 1; index < points.length; index += 1) {
    const a = points[index - 1];
    const b = points[index];
    if (a === undefined || b === undefined || a.v >= level || b.v < level) continue;
    return a.t + ((b.t - a.t) * (level - a.v)) / (b.v - a.v);
  }
  return undefined;
}
