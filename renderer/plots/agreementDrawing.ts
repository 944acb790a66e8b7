import { extent, scaleLinear } from 'd3';
import type { Agreement } from '../../core/agreement/index.js';

/** Room for the axes, px. */
export const ROOM_PX = { left: 52, right: 12, top: 10, bottom: 34 } as const;

/** Places of a Bland–Altman plot: difference over mean, with bias and limits. */
export function agreementDrawing(
  { limits: { points, bias, lower, upper } }: Agreement,
  widthPx: number,
  heightPx: number,
) {
  const [least = 0, most = 1] = extent(points, ({ mean }) => mean);
  const margin = most > least ? 0.08 * (most - least) : Math.max(1, Math.abs(most) * 0.1);
  const x = scaleLinear([least - margin, most + margin], [ROOM_PX.left, widthPx - ROOM_PX.right]);
  const all = [...points.map(({ difference }) => difference), lower.value, upper.value, 0];
  const [low = -1, high = 1] = extent(all);
  const reach = high > low ? 0.12 * (high - low) : 1;
  const y = scaleLinear(
    [low - reach, high + reach],
    [heightPx - ROOM_PX.bottom, ROOM_PX.top],
  ).nice();
  return {
    x,
    y,
    points: points.map(({ mean, difference }) => ({ x: x(mean), y: y(difference) })),
    lines: [
      { kind: 'bias', value: bias.value, y: y(bias.value) },
      { kind: 'limit', value: lower.value, y: y(lower.value) },
      { kind: 'limit', value: upper.value, y: y(upper.value) },
    ] as const,
  };
}
