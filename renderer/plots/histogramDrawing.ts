import { area, curveStepAfter, line, max, type ScaleLinear, scaleLinear } from 'd3';
import { formatCount, formatQuantity } from '../../core/format/index.js';
import type { PairedHistogram } from '../../core/region/index.js';

/** What the histogram's picture is made of, in CSS px. */
export interface HistogramDrawing {
  readonly x: ScaleLinear<number, number>;
  readonly y: ScaleLinear<number, number>;
  readonly softLine: string;
  readonly softArea: string;
  readonly sharpLine: string;
}

export const MARGIN_PX = { top: 22, right: 6, bottom: 32, left: 34 } as const;

/** Scales and step lines for a histogram in a picture of this size. */
export function histogramDrawing(
  histogram: PairedHistogram,
  widthPx: number,
  heightPx: number,
): HistogramDrawing {
  const { startHu, binWidthHu, soft, sharp } = histogram;
  const endHu = startHu + binWidthHu * soft.length;
  const most = max([...soft, ...sharp]) ?? 0;
  const x = scaleLinear([startHu, endHu], [MARGIN_PX.left, widthPx - MARGIN_PX.right]);
  const y = scaleLinear([0, most], [heightPx - MARGIN_PX.bottom, MARGIN_PX.top]).nice(4);
  // A step line begins and ends on the axis, so that the outer bins are closed.
  const steps = (counts: readonly number[]) => [
    { hu: startHu, count: 0 },
    ...counts.map((count, i) => ({ hu: startHu + i * binWidthHu, count })),
    { hu: endHu, count: counts.at(-1) ?? 0 },
    { hu: endHu, count: 0 },
  ];
  type Step = ReturnType<typeof steps>[number];
  const outline = line<Step>()
    .x(({ hu }) => x(hu))
    .y(({ count }) => y(count))
    .curve(curveStepAfter);
  const filled = area<Step>()
    .x(({ hu }) => x(hu))
    .y0(y(0))
    .y1(({ count }) => y(count))
    .curve(curveStepAfter);
  return {
    x,
    y,
    softLine: outline(steps(soft)) ?? '',
    softArea: filled(steps(soft)) ?? '',
    sharpLine: sharp.some((count) => count > 0) ? (outline(steps(sharp)) ?? '') : '',
  };
}

/** The histogram in words, for those who do not see it. */
export function histogramSummary(
  histogram: PairedHistogram,
  unit: string,
  meanSoft: number | null,
  meanSharp: number | null,
): string {
  const total = (counts: readonly number[]) => counts.reduce((sum, count) => sum + count, 0);
  const kernel = (name: string, counts: readonly number[], mean: number | null) => {
    if (total(counts) === 0) return `${name}: no pixels.`;
    const used = counts.flatMap((count, i) => (count > 0 ? [i] : []));
    const edge = (bin: number) =>
      formatQuantity(histogram.startHu + bin * histogram.binWidthHu, 'pixelHu');
    const range = `${edge(used[0] ?? 0)} to ${edge((used.at(-1) ?? 0) + 1)} ${unit}`;
    const about = mean === null ? '' : `, mean ${formatQuantity(mean, 'hu')}`;
    return `${name}: ${formatCount(total(counts))} pixels from ${range}${about}.`;
  };
  return [
    kernel('Soft', histogram.soft, meanSoft),
    kernel('Sharp', histogram.sharp, meanSharp),
    `${histogram.soft.length} bins of ${formatQuantity(histogram.binWidthHu, 'hu')} ${unit}.`,
  ].join(' ');
}
