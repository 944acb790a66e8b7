import { type Box, blend, type Colour, type Raster } from './raster.js';

/** A place in a picture; whole numbers are the centres of pixels. */
export interface RasterPoint {
  readonly x: number;
  readonly y: number;
}

export interface Stroke {
  readonly colour: Colour;
  readonly widthPx: number;
  /** Lengths that are drawn and left out in turn; none for a solid line. */
  readonly dashPx?: readonly number[];
  /** The last point is joined with the first. */
  readonly closed?: boolean;
  /** Nothing is drawn outside. */
  readonly clip?: Box;
}

/**
 * A line through points, smooth at its edges: each pixel is covered by as much as the line's half width exceeds its
 * distance to the line. Pixels are counted once, so that corners are no darker than the rest.
 */
export function drawLine(raster: Raster, points: readonly RasterPoint[], stroke: Stroke): void {
  const pieces = dashes(stroke.closed === true ? closed(points) : points, stroke.dashPx ?? []);
  const reach = stroke.widthPx / 2 + 1;
  const clip = stroke.clip ?? { x: 0, y: 0, width: raster.width, height: raster.height };
  const covered = new Map<number, number>();
  for (const [a, b] of pieces) {
    const left = Math.max(clip.x, Math.floor(Math.min(a.x, b.x) - reach));
    const right = Math.min(clip.x + clip.width - 1, Math.ceil(Math.max(a.x, b.x) + reach));
    const top = Math.max(clip.y, Math.floor(Math.min(a.y, b.y) - reach));
    const bottom = Math.min(clip.y + clip.height - 1, Math.ceil(Math.max(a.y, b.y) + reach));
    for (let y = top; y <= bottom; y += 1) {
      for (let x = left; x <= right; x += 1) {
        const coverage = Math.min(1, stroke.widthPx / 2 + 0.5 - distance({ x, y }, a, b));
        const at = y * raster.width + x;
        if (coverage > (covered.get(at) ?? 0)) covered.set(at, coverage);
      }
    }
  }
  for (const [at, coverage] of covered) {
    const x = at % raster.width;
    blend(raster, x, (at - x) / raster.width, stroke.colour, coverage);
  }
}

type Piece = readonly [RasterPoint, RasterPoint];

function closed(points: readonly RasterPoint[]): readonly RasterPoint[] {
  const [first] = points;
  return first === undefined ? points : [...points, first];
}

/** The pieces of a line that are drawn. */
function dashes(points: readonly RasterPoint[], pattern: readonly number[]): readonly Piece[] {
  const pieces: Piece[] = [];
  let index = 0;
  let left = pattern[0] ?? Number.POSITIVE_INFINITY;
  for (let next = 1; next < points.length; next += 1) {
    let from = points[next - 1] as RasterPoint;
    const end = points[next] as RasterPoint;
    let length = Math.hypot(end.x - from.x, end.y - from.y);
    while (length > 0) {
      const step = Math.min(left, length);
      const share = step / length;
      const to = { x: from.x + share * (end.x - from.x), y: from.y + share * (end.y - from.y) };
      if (index % 2 === 0) pieces.push([from, to]);
      from = to;
      length -= step;
      left -= step;
      if (left > 1e-9) continue;
      index += 1;
      left = pattern[index % pattern.length] ?? Number.POSITIVE_INFINITY;
    }
  }
  return pieces;
}

function distance(point: RasterPoint, a: RasterPoint, b: RasterPoint): number {
  const [dx, dy] = [b.x - a.x, b.y - a.y];
  const square = dx * dx + dy * dy;
  const along = square === 0 ? 0 : ((point.x - a.x) * dx + (point.y - a.y) * dy) / square;
  const share = Math.min(1, Math.max(0, along));
  return Math.hypot(point.x - a.x - share * dx, point.y - a.y - share * dy);
}
