import { extent, line, max, type ScaleLinear, scaleLinear } from 'd3';
import { formatFixed } from '../../core/format/index.js';
import { type LineEdge, normalCdf, RISE_PER_SIGMA } from '../../core/quality/index.js';

/** What the picture of an edge's profiles is made of, in CSS px. */
export interface EdgeDrawing {
  readonly x: ScaleLinear<number, number>;
  readonly y: ScaleLinear<number, number>;
}

/** The drawing of one kernel's profile. */
export interface ProfileDrawing {
  readonly dots: readonly { readonly x: number; readonly y: number }[];
  /** The blurred step that was fitted. */
  readonly curve: string;
  /** Where the fitted edge has done 10 and 90 % of its step. */
  readonly marks: readonly {
    readonly percent: 10 | 90;
    readonly x: number;
    readonly y: number;
  }[];
}

export const EDGE_MARGIN_PX = { top: 22, right: 10, bottom: 30, left: 40 } as const;
/** Profiles are drawn this far to either side of the edge at least, mm. */
const LEAST_REACH_MM = 2;
/** And no farther than this many rise distances. */
const MOST_RISES = 3;
const CURVE_POINTS = 120;

/** Scales that hold the profiles of all kernels that have one. */
export function edgeDrawing(
  edges: readonly LineEdge[],
  widthPx: number,
  heightPx: number,
): EdgeDrawing {
  const rise = max(edges, ({ riseMm }) => riseMm) ?? 1;
  const reach = Math.max(LEAST_REACH_MM, MOST_RISES * rise);
  const hu = edges.flatMap(({ profile }) =>
    profile.flatMap((point) => (Math.abs(point.mm) <= reach ? [point.hu] : [])),
  );
  const [low = 0, high = 1] = extent(hu);
  return {
    x: scaleLinear([-reach, reach], [EDGE_MARGIN_PX.left, widthPx - EDGE_MARGIN_PX.right]),
    y: scaleLinear(
      [low, Math.max(high, low + 1)],
      [heightPx - EDGE_MARGIN_PX.bottom, EDGE_MARGIN_PX.top],
    ).nice(4),
  };
}

/** One kernel's profile on these scales. */
export function profileDrawing(edge: LineEdge, { x, y }: EdgeDrawing): ProfileDrawing {
  const { fromHu, toHu, riseMm, profile } = edge;
  const sigmaMm = riseMm / RISE_PER_SIGMA;
  const [left = 0, right = 1] = x.domain();
  const hu = (mm: number): number => fromHu + (toHu - fromHu) * normalCdf(mm / sigmaMm);
  const places = Array.from(
    { length: CURVE_POINTS + 1 },
    (_, index) => left + ((right - left) * index) / CURVE_POINTS,
  );
  const curve = line<number>()
    .x((mm) => x(mm))
    .y((mm) => y(hu(mm)));
  return {
    dots: profile.flatMap((point) =>
      point.mm < left || point.mm > right ? [] : [{ x: x(point.mm), y: y(point.hu) }],
    ),
    curve: curve(places) ?? '',
    marks: [
      { percent: 10, x: x(-riseMm / 2), y: y(hu(-riseMm / 2)) },
      { percent: 90, x: x(riseMm / 2), y: y(hu(riseMm / 2)) },
    ],
  };
}

/** Both profiles in words, for those who do not see them. */
export function edgeSummary(
  label: string,
  soft: LineEdge | undefined,
  sharp: LineEdge | undefined,
): string {
  const words = (name: string, edge: LineEdge | undefined): string =>
    edge === undefined
      ? `${name}: no edge.`
      : `${name}: from ${formatFixed(edge.fromHu, 0)} to ${formatFixed(edge.toHu, 0)} HU, 10 to 90 % over ${formatFixed(edge.riseMm, 2)} mm.`;
  return `Profile across ${label}. ${words('Soft', soft)} ${words('Sharp', sharp)}`;
}
