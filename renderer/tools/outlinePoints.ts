import type { PlatePoint } from '../plates/platePoint.js';

/** A click this near to the first point closes an outline, CSS pixels. */
export const CLOSING_PX = 8;

/** Points of a traced line may leave it by this much when they are thinned out, CSS pixels. */
const TOLERANCE_PX = 0.6;

/**
 * A traced line with fewer points, none of which strays from the line by more than the tolerance.
 * Douglas and Peucker, The Canadian Cartographer 10(2) 1973, doi:10.3138/FM57-6770-U75U-7727.
 */
export function thinned(
  points: readonly PlatePoint[],
  tolerancePx: number = TOLERANCE_PX,
): readonly PlatePoint[] {
  const kept = new Set([0, points.length - 1]);
  const spans: (readonly [number, number])[] = [[0, points.length - 1]];
  for (let span = spans.pop(); span !== undefined; span = spans.pop()) {
    const [from, to] = span;
    let farthest = tolerancePx;
    let at = -1;
    for (let index = from + 1; index < to; index++) {
      const away = distanceToSegment(points[index], points[from], points[to]);
      if (away > farthest) [farthest, at] = [away, index];
    }
    if (at >= 0) {
      kept.add(at);
      spans.push([from, at], [at, to]);
    }
  }
  return points.filter((_, index) => kept.has(index));
}

/** Distance from a point to the segment between two others, CSS pixels; 0 where a point is missing. */
export function distanceToSegment(
  point: PlatePoint | undefined,
  from: PlatePoint | undefined,
  to: PlatePoint | undefined,
): number {
  if (point === undefined || from === undefined || to === undefined) return 0;
  const [dx, dy] = [to.x - from.x, to.y - from.y];
  const size = dx * dx + dy * dy;
  const share = size === 0 ? 0 : ((point.x - from.x) * dx + (point.y - from.y) * dy) / size;
  const held = Math.min(Math.max(share, 0), 1);
  return Math.hypot(point.x - from.x - held * dx, point.y - from.y - held * dy);
}
