import { ticks } from 'd3';

/** Positions in mm along the stacks' normal on the height of the twin ruler; the greatest is at the top. */
export interface RulerScale {
  readonly fromMm: number;
  readonly toMm: number;
  readonly toPx: (mm: number) => number;
  /** The inverse; places beyond the ends give the ends. */
  readonly mmAt: (px: number) => number;
}

/** One stack's slices on the ruler. */
export interface RulerTicks {
  /** A tick for every stride-th slice; long where its index is a multiple of ten strides. */
  readonly ticks: readonly { readonly px: number; readonly long: boolean }[];
  readonly stride: number;
  /** Places with slices missing: more than one and a half of the usual spacing. */
  readonly gaps: readonly { readonly topPx: number; readonly bottomPx: number }[];
  /** From its first to its last slice. */
  readonly topPx: number;
  readonly bottomPx: number;
}

/** Room at both ends, so that the handle stays inside. */
const MARGIN_PX = 14;
const LEAST_TICK_PX = 3;
const GAP_FACTOR = 1.5;

/** One scale for both stacks; undefined without any slice. A single position gets a millimetre of room on each side. */
export function rulerScale(
  positionsMm: readonly (readonly number[])[],
  heightPx: number,
): RulerScale | undefined {
  const all = positionsMm.flat();
  if (all.length === 0) return undefined;
  let fromMm = all.reduce((a, b) => Math.min(a, b));
  let toMm = all.reduce((a, b) => Math.max(a, b));
  if (fromMm === toMm) {
    fromMm -= 1;
    toMm += 1;
  }
  const spanPx = Math.max(1, heightPx - 2 * MARGIN_PX);
  const perMm = spanPx / (toMm - fromMm);
  return {
    fromMm,
    toMm,
    toPx: (mm) => MARGIN_PX + (toMm - mm) * perMm,
    mmAt: (px) => Math.min(toMm, Math.max(fromMm, toMm - (px - MARGIN_PX) / perMm)),
  };
}

/** Ticks at least 3 px apart, by leaving out slices; gaps are kept whatever is left out. Positions ascend. */
export function rulerTicks(positionsMm: readonly number[], scale: RulerScale): RulerTicks {
  const steps = positionsMm.slice(1).map((mm, i) => mm - (positionsMm[i] ?? mm));
  const usual = steps.toSorted((a, b) => a - b)[(steps.length - 1) >> 1] ?? 0;
  const usualPx = Math.abs(scale.toPx(0) - scale.toPx(usual));
  const stride = [1, 2, 5, 10, 20, 50, 100].find((n) => n * usualPx >= LEAST_TICK_PX) ?? 200;
  const at = (index: number) => scale.toPx(positionsMm[index] ?? 0);
  return {
    ticks: positionsMm
      .map((mm, index) => ({ px: scale.toPx(mm), long: index % (10 * stride) === 0, index }))
      .filter(({ index }) => index % stride === 0)
      .map(({ px, long }) => ({ px, long })),
    stride,
    gaps: steps.flatMap((step, i) =>
      step > GAP_FACTOR * usual ? [{ topPx: at(i + 1), bottomPx: at(i) }] : [],
    ),
    topPx: at(positionsMm.length - 1),
    bottomPx: at(0),
  };
}

/** Round positions for the labels, some 36 px apart. */
export function rulerLabelsMm(scale: RulerScale, heightPx: number): readonly number[] {
  const count = Math.max(1, Math.floor((heightPx - 2 * MARGIN_PX) / 36));
  return ticks(scale.fromMm, scale.toMm, count);
}

/** The slice that lies count slices further; the end of the stack when there are not that many. Positions ascend. */
export function nextPositionMm(
  positionsMm: readonly number[],
  fromMm: number,
  count: number,
): number | undefined {
  const tolerance = 1e-3;
  const last = positionsMm.length - 1;
  if (last < 0) return undefined;
  const above = positionsMm.findIndex((mm) => mm > fromMm + tolerance);
  const firstAbove = above < 0 ? last + 1 : above;
  const below = positionsMm.findLastIndex((mm) => mm < fromMm - tolerance);
  const wanted = count > 0 ? firstAbove + count - 1 : below + count + 1;
  return positionsMm[Math.min(last, Math.max(0, wanted))];
}
