import type { Vec3 } from '../geometry/index.js';
import {
  addEdges,
  type EdgeSamples,
  type EdgeSums,
  type Estimate,
  edgeSums,
  fitEdge,
  jackknife,
  riseDistanceMm,
} from '../quality/index.js';
import { ALONG_MM, type EdgePlace } from './sharpnessEdges.js';
import { huRectangle, type Plane } from './sharpnessPlane.js';

/** Where an edge was measured on both stacks. */
export interface MeasuredEdge {
  readonly atMm: Vec3;
  readonly stepHu: number;
}

/** Reach of a profile across an edge, from the middle, mm. */
const ACROSS_MM = 4;
/** Reach of the edge spread: half a millimetre is left for where the edge really lies. */
const SPREAD_REACH_MM = 3.5;

/** The edge spread of one edge on one plane, and the blur of the step that fits it. */
export interface EdgeSpread {
  readonly sigmaMm: number;
  readonly sums: EdgeSums;
}

/** Measures one edge on one plane; undefined when there is no clear edge. */
export function measureEdge(plane: Plane, place: EdgePlace): EdgeSpread | undefined {
  const samples = samplesAround(plane, place);
  if (samples === undefined) return undefined;
  const stepHu = place.highHu - place.lowHu;
  const edge = fitEdge(samples, { lowHu: place.lowHu, stepHu, sigmaMm: 0.6 });
  if (edge === undefined) return undefined;
  const clear =
    edge.sigmaMm > 0.05 &&
    edge.sigmaMm < 2 &&
    Math.abs(edge.offsetMm) < 2 &&
    Math.abs(edge.slope) < 0.4 &&
    Math.abs(edge.stepHu / stepHu - 1) < 0.25 &&
    edge.residualHu < 0.5 * stepHu;
  return clear
    ? { sigmaMm: edge.sigmaMm, sums: edgeSums(samples, edge, SPREAD_REACH_MM) }
    : undefined;
}

/** Pixels whose centres lie in the piece around an edge; undefined where it leaves the image or holds padding. */
function samplesAround(plane: Plane, { xMm, yMm, direction }: EdgePlace): EdgeSamples | undefined {
  const [nx, ny] = direction;
  const reach = [
    ACROSS_MM * Math.abs(nx) + ALONG_MM * Math.abs(ny),
    ACROSS_MM * Math.abs(ny) + ALONG_MM * Math.abs(nx),
  ] as const;
  const [dx, dy] = plane.spacingMm;
  const firstColumn = Math.ceil((xMm - reach[0] - plane.originMm[0]) / dx);
  const firstRow = Math.ceil((yMm - reach[1] - plane.originMm[1]) / dy);
  const columns = Math.floor((xMm + reach[0] - plane.originMm[0]) / dx) - firstColumn + 1;
  const rows = Math.floor((yMm + reach[1] - plane.originMm[1]) / dy) - firstRow + 1;
  const hu = huRectangle(plane, firstColumn, firstRow, columns, rows);
  if (hu === undefined) return undefined;
  const across: number[] = [];
  const along: number[] = [];
  const kept: number[] = [];
  hu.forEach((value, index) => {
    const x = plane.originMm[0] + (firstColumn + (index % columns)) * dx - xMm;
    const y = plane.originMm[1] + (firstRow + Math.floor(index / columns)) * dy - yMm;
    const t = x * nx + y * ny;
    const s = y * nx - x * ny;
    if (Math.abs(t) > ACROSS_MM || Math.abs(s) > ALONG_MM) return;
    across.push(t);
    along.push(s);
    kept.push(value);
  });
  return {
    acrossMm: Float64Array.from(across),
    alongMm: Float64Array.from(along),
    hu: Float64Array.from(kept),
  };
}

/** How the edges of two stacks compare. */
export interface EdgeComparison {
  /** 10–90 % rise distance over all edges, mm, with its standard error. */
  readonly firstMm: Estimate;
  readonly secondMm: Estimate;
  /** ln(second / first) of the rise distances: below 0 where the second is the sharper. */
  readonly rise: Estimate;
}

/** A step that is wider than the narrowest ones by more is none: walls, slanting and thin layers lie in it. */
const NARROW_SHARE = 1.35;

/**
 * The edges that are one step: those whose blur, as the geometric mean of both stacks, is near that of the narrowest
 * fifth. Both stacks have the same say, so that the choice favours neither.
 */
export function singleSteps<
  Edge extends { readonly first: EdgeSpread; readonly second: EdgeSpread },
>(edges: readonly Edge[]): readonly Edge[] {
  const widths = edges.map(({ first, second }) => Math.sqrt(first.sigmaMm * second.sigmaMm));
  const narrow = widths.toSorted((a, b) => a - b)[Math.floor(widths.length / 5)] ?? 0;
  return edges.filter((_, index) => (widths[index] ?? Infinity) <= NARROW_SHARE * narrow);
}

/** Compares the rise over the same edges, each left out of both stacks at once for the errors. */
export function compareEdges(
  edges: readonly { readonly first: EdgeSpread; readonly second: EdgeSpread }[],
): EdgeComparison | undefined {
  if (edges.length < 2) return undefined;
  const rises = (side: 'first' | 'second'): ((leftOut: number) => number | undefined) => {
    const all = edges.map((edge) => edge[side].sums);
    const known = new Map<number, number | undefined>();
    return (leftOut) => {
      if (!known.has(leftOut)) known.set(leftOut, riseDistanceMm(addEdges(all, leftOut)));
      return known.get(leftOut);
    };
  };
  const [first, second] = [rises('first'), rises('second')];
  const firstMm = jackknife(edges.length, first);
  const secondMm = jackknife(edges.length, second);
  const rise = jackknife(edges.length, (leftOut) => {
    const [a, b] = [first(leftOut), second(leftOut)];
    return a === undefined || b === undefined ? undefined : Math.log(b / a);
  });
  return firstMm && secondMm && rise && { firstMm, secondMm, rise };
}
