import { extent, line, type ScaleLinear, scaleLinear } from 'd3';
import type { Kernel } from '../../core/note/index.js';

/** HU over a distance, mm. */
export interface AcrossPoint {
  readonly mm: number;
  readonly hu: number;
}

/** What one kernel shows across a vessel. */
export interface AcrossSeries {
  readonly kernel: Kernel;
  /** As measured. */
  readonly measured: readonly AcrossPoint[];
  /** The fitted model; empty where nothing was fitted. */
  readonly fitted: readonly AcrossPoint[];
  /** Places that numbers were read off at: struts and half-height points. */
  readonly marks: readonly (AcrossPoint & { readonly name: string })[];
}

/** A width that is drawn as a bracket under the curves. */
export interface AcrossSpan {
  readonly fromMm: number;
  readonly toMm: number;
  readonly name: string;
}

/** A picture of what lies across a vessel. */
export interface Across {
  readonly label: string;
  readonly series: readonly AcrossSeries[];
  readonly spans: readonly AcrossSpan[];
  /** Upright lines, as the places of fitted struts. */
  readonly uprightMm: readonly number[];
  /** What the axis counts: 'mm along the line'. */
  readonly axis: string;
  /** All of it in words. */
  readonly summary: string;
}

export const ACROSS_MARGIN_PX = { top: 22, right: 10, bottom: 30, left: 44 } as const;
/** Height of a bracket's line, px. */
const SPAN_PX = 13;

export interface AcrossScales {
  readonly x: ScaleLinear<number, number>;
  readonly y: ScaleLinear<number, number>;
}

/** Scales that hold all curves, with room for the brackets at the bottom. */
export function acrossScales(
  { series, spans }: Pick<Across, 'series' | 'spans'>,
  widthPx: number,
  heightPx: number,
): AcrossScales {
  const points = series.flatMap(({ measured, fitted }) => [...measured, ...fitted]);
  const [left = 0, right = 1] = extent(points, ({ mm }) => mm);
  const [low = 0, high = 1] = extent(points, ({ hu }) => hu);
  const bottomPx = heightPx - ACROSS_MARGIN_PX.bottom - SPAN_PX * spans.length;
  return {
    x: scaleLinear([left, right], [ACROSS_MARGIN_PX.left, widthPx - ACROSS_MARGIN_PX.right]),
    y: scaleLinear([low, Math.max(high, low + 1)], [bottomPx, ACROSS_MARGIN_PX.top]).nice(4),
  };
}

/** A curve through points. */
export function acrossPath(points: readonly AcrossPoint[], { x, y }: AcrossScales): string {
  const path = line<AcrossPoint>()
    .x(({ mm }) => x(mm))
    .y(({ hu }) => y(hu));
  return path([...points]) ?? '';
}

/** Height of the bracket with this index, px from the top. */
export function spanY(index: number, heightPx: number): number {
  return heightPx - ACROSS_MARGIN_PX.bottom - SPAN_PX * index - 4;
}
