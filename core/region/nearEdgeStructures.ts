import type { EdgeLevels } from './nearEdgeLevels.js';
import type { EdgeWindow, Sought } from './nearEdgeWindow.js';

/** What a strong edge is the edge of. Bone counts as calcium. */
export type EdgeKind = 'strut' | 'calcium' | 'air';

/** A bright structure or air within a window: which pixels it holds, row × columns + column of the window. */
export interface Structure {
  readonly kind: EdgeKind;
  readonly pixels: readonly number[];
  /** How far its true border lies behind its contour, in blurs: a thin thing looks as wide as the blur. */
  readonly behindBlurs: number;
  /** Level of its contour at each of these pixels, HU: half way between it and its surroundings. */
  readonly levelHu: readonly number[];
}

/**
 * Air is what lies below this, about half way between lung and tissue, and reaches the second somewhere. Lung is
 * −900 to −700 HU, air −1000. Common practice, no source.
 */
const AIR_HU = -400;
const AIR_SEED_HU = -600;
/** The brightest pixel within this many blurs is the height of a structure at a place. */
const HEIGHT_BLURS = 0.75;

/** What may hold a structure at all. A region that is air itself lies at no edge of air. */
export function soughtBy({ brightHu }: EdgeLevels, regionHu: number): Sought {
  return { aboveHu: brightHu, belowHu: regionHu < AIR_HU ? -Infinity : AIR_HU };
}

/**
 * Bright structures and air in a smoothed window. A bright structure is a connected set of pixels above the enhanced
 * lumen, with a peak that noise does not reach, or a length that it does not. Its border at a place is the contour
 * half way between the brightest pixel close by and the lumen, or the region where that is the darker.
 *
 * @param regionHu what the region measures: the surroundings of what lies beside it
 */
export function structuresIn(
  window: EdgeWindow,
  spacingMm: readonly [number, number],
  levels: EdgeLevels,
  regionHu: number,
): readonly Structure[] {
  const { hu } = window;
  const { aboveHu, belowHu } = soughtBy(levels, regionHu);
  const [above, below]: [number[], number[]] = [[], []];
  for (let at = 0; at < hu.length; at++) {
    const value = hu[at] as number;
    if (value > aboveHu) above.push(at);
    else if (value < belowHu) below.push(at);
  }
  const bright = components(window, above).flatMap((pixels): Structure[] => {
    const isStrong =
      pixels.some((at) => (hu[at] as number) >= levels.peakHu) ||
      extentMm(pixels, window, spacingMm) >= levels.longMm;
    return isStrong ? [brightStructure(pixels, window, spacingMm, levels, regionHu)] : [];
  });
  const air = components(window, below).flatMap((pixels): Structure[] =>
    pixels.some((at) => (hu[at] as number) <= AIR_SEED_HU)
      ? [{ kind: 'air', pixels, behindBlurs: 0, levelHu: pixels.map(() => AIR_HU) }]
      : [],
  );
  return [...bright, ...air];
}

function brightStructure(
  pixels: readonly number[],
  { hu, columns, rows }: EdgeWindow,
  spacingMm: readonly [number, number],
  levels: EdgeLevels,
  regionHu: number,
): Structure {
  const surroundHu = Math.min(regionHu, levels.lumenHu);
  const across = Math.floor((HEIGHT_BLURS * levels.blurMm) / spacingMm[0]);
  const down = Math.floor((HEIGHT_BLURS * levels.blurMm) / spacingMm[1]);
  const heightNear = (at: number): number => {
    const [row, column] = [Math.floor(at / columns), at % columns];
    let height = -Infinity;
    for (let r = Math.max(0, row - down); r <= Math.min(rows - 1, row + down); r++)
      for (let c = Math.max(0, column - across); c <= Math.min(columns - 1, column + across); c++)
        height = Math.max(height, hu[r * columns + c] as number);
    return height;
  };
  const kept: number[] = [];
  const levelHu: number[] = [];
  for (const at of pixels) {
    const halfHu = (heightNear(at) + surroundHu) / 2;
    if ((hu[at] as number) < Math.max(levels.brightHu, halfHu)) continue;
    kept.push(at);
    levelHu.push(halfHu);
  }
  return { ...brightKind(kept, hu, columns, spacingMm, levels), pixels: kept, levelHu };
}

/** A disc fills its ellipse of inertia; a ring, an arc or a line of this fill or less is a strut. */
const MOST_FILL = 0.75;
/** A strut may be straight: this many times as long as wide, and no wider than blur makes a thin thing. */
const LEAST_ASPECT = 2.5;
const THIN_BLURS = 1.5;

/** A bent strut is thin; what is long and straight may be a narrow grain too. */
const BENT_BEHIND = 0.35;
const STRAIGHT_BEHIND = 0.15;

/** Struts are thin and bent or long; calcium is compact. Decided by the shape of the contour, and by a dip in its middle. */
function brightKind(
  pixels: readonly number[],
  hu: Float64Array,
  columns: number,
  [acrossMm, downMm]: readonly [number, number],
  levels: EdgeLevels,
): Pick<Structure, 'kind' | 'behindBlurs'> {
  let [sumX, sumY, sumXX, sumYY, sumXY, sumHu] = [0, 0, 0, 0, 0, 0];
  for (const at of pixels) {
    const [x, y] = [(at % columns) * acrossMm, Math.floor(at / columns) * downMm];
    sumX += x;
    sumY += y;
    sumXX += x * x;
    sumYY += y * y;
    sumXY += x * y;
    sumHu += hu[at] as number;
  }
  const n = pixels.length;
  const [x, y] = [sumX / n, sumY / n];
  // Each pixel adds the variance of its own square.
  const xx = sumXX / n - x * x + (acrossMm * acrossMm) / 12;
  const yy = sumYY / n - y * y + (downMm * downMm) / 12;
  const xy = sumXY / n - x * y;
  const spread = Math.sqrt(((xx - yy) / 2) ** 2 + xy * xy);
  const [long, short] = [(xx + yy) / 2 + spread, Math.max(1e-9, (xx + yy) / 2 - spread)];
  // The area of an even ellipse is 4π√(λ₁λ₂), its half axes are 2√λ.
  const fill = (n * acrossMm * downMm) / (4 * Math.PI * Math.sqrt(long * short));
  if (fill <= MOST_FILL) return { kind: 'strut', behindBlurs: BENT_BEHIND };
  const middle = hu[Math.round(y / downMm) * columns + Math.round(x / acrossMm)] as number;
  const isHollow = middle < sumHu / n - (levels.peakHu - levels.lumenHu) / 2;
  const isThin = 4 * Math.sqrt(short) <= THIN_BLURS * levels.blurMm;
  const isLong = Math.sqrt(long / short) >= LEAST_ASPECT;
  if (isHollow) return { kind: 'strut', behindBlurs: BENT_BEHIND };
  return isThin && isLong
    ? { kind: 'strut', behindBlurs: STRAIGHT_BEHIND }
    : { kind: 'calcium', behindBlurs: 0 };
}

function extentMm(
  pixels: readonly number[],
  { columns }: EdgeWindow,
  [acrossMm, downMm]: readonly [number, number],
): number {
  let [left, right, top, bottom] = [Infinity, -Infinity, Infinity, -Infinity];
  for (const at of pixels) {
    const [row, column] = [Math.floor(at / columns), at % columns];
    left = Math.min(left, column);
    right = Math.max(right, column);
    top = Math.min(top, row);
    bottom = Math.max(bottom, row);
  }
  return Math.hypot((right - left) * acrossMm, (bottom - top) * downMm);
}

/** Sets of these pixels that hang together by sides or corners. */
function components(
  { columns, rows, hu }: EdgeWindow,
  members: readonly number[],
): readonly (readonly number[])[] {
  if (members.length === 0) return [];
  const waiting = new Uint8Array(hu.length);
  for (const at of members) waiting[at] = 1;
  return members.flatMap((start): readonly number[][] => {
    if (waiting[start] !== 1) return [];
    waiting[start] = 0;
    const pixels = [start];
    for (let next = 0; next < pixels.length; next++) {
      const at = pixels[next] as number;
      const row = Math.floor(at / columns);
      const column = at - row * columns;
      const [firstRow, lastRow] = [Math.max(0, row - 1), Math.min(rows - 1, row + 1)];
      const [first, last] = [Math.max(0, column - 1), Math.min(columns - 1, column + 1)];
      for (let r = firstRow; r <= lastRow; r++)
        for (let c = first; c <= last; c++) {
          const other = r * columns + c;
          if (waiting[other] !== 1) continue;
          waiting[other] = 0;
          pixels.push(other);
        }
    }
    return [pixels];
  });
}
