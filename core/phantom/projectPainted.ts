import { viewOfEllipse } from './ellipse.js';
import { relativeToWater, type SceneObject } from './scene.js';

/** Numbers of one tissue in the table that the loop over rays reads. */
const WIDTH = 6;

/**
 * Line integrals of tissues that cover one another, water = 1, air = 0, for rays t = firstMm + i·stepMm of one
 * view. Each ray goes from the uppermost tissue down and counts only the length that nothing above has covered.
 */
export function projectPainted(
  painted: readonly SceneObject[],
  thetaRad: number,
  firstMm: number,
  stepMm: number,
  target: Float64Array,
): void {
  const table = tableOf(painted, thetaRad);
  // Stretches of the ray that are covered so far; no two of them touch.
  const starts = new Float64Array(painted.length);
  const ends = new Float64Array(painted.length);
  for (let ray = 0; ray < target.length; ray += 1) {
    const t = firstMm + ray * stepMm;
    let covered = 0;
    let integral = 0;
    for (let at = 0; at < table.length; at += WIDTH) {
      const d = t - (table[at] as number);
      const square = (table[at + 1] as number) - d * d;
      if (square <= 0) continue;
      const half = (table[at + 2] as number) * Math.sqrt(square);
      const middle = (table[at + 3] as number) + d * (table[at + 4] as number);
      const from = middle - half;
      const to = middle + half;
      let seen = to - from;
      let low = from;
      let high = to;
      // Downwards, so that the stretch that fills a gap is one that was looked at before.
      for (let index = covered - 1; index >= 0; index -= 1) {
        const start = starts[index] as number;
        const end = ends[index] as number;
        if (start > to || end < from) continue;
        seen -= Math.min(end, to) - Math.max(start, from);
        if (start < low) low = start;
        if (end > high) high = end;
        covered -= 1;
        starts[index] = starts[covered] as number;
        ends[index] = ends[covered] as number;
      }
      starts[covered] = low;
      ends[covered] = high;
      covered += 1;
      integral += seen * (table[at + 5] as number);
    }
    target[ray] = integral;
  }
}

/** The tissues from the uppermost down, as this view sees them. */
function tableOf(painted: readonly SceneObject[], thetaRad: number): Float64Array {
  return Float64Array.from(
    painted.toReversed().flatMap((one) => {
      const { tCentre, sCentre, reach, halfFactor, slope } = viewOfEllipse(one, thetaRad);
      return [tCentre, reach * reach, halfFactor, sCentre, slope, relativeToWater(one.hu)];
    }),
  );
}
