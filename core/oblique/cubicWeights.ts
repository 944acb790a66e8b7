import { cubicWeights } from '../stent/cubic.js';

/**
 * Weights between slices of uneven distances: the cubic Hermite curve through the two neighbours whose slope at each of them
 * is that of the parabola through it and the slices to both sides. Even distances give cubic convolution (Keys 1981,
 * doi 10.1109/TASSP.1981.1163711, a = −½); like it, it is exact up to second order. Where a run of slices ends, the slope
 * is that of the straight line between the last two, and it is exact up to first order.
 *
 * @param part of the way from the second of four slices to the third
 * @param beforeMm from the first to the second; 0 where there is no first
 * @param afterMm from the third to the fourth; 0 where there is no fourth
 */
export function unevenWeights(
  part: number,
  beforeMm: number,
  betweenMm: number,
  afterMm: number,
  into: Float64Array,
): void {
  const tt = part * part;
  const ttt = tt * part;
  const second = 2 * ttt - 3 * tt + 1;
  // What the slopes count, each per distance between the two neighbours.
  const slopeSecond = ttt - 2 * tt + part;
  const slopeThird = ttt - tt;
  // Of each slope, the part that the neighbours' own difference has; the rest is of the difference beyond.
  const ownSecond = beforeMm > 0 ? beforeMm / (beforeMm + betweenMm) : 1;
  const ownThird = afterMm > 0 ? afterMm / (afterMm + betweenMm) : 1;
  const own = slopeSecond * ownSecond + slopeThird * ownThird;
  const before = beforeMm > 0 ? (slopeSecond * (1 - ownSecond) * betweenMm) / beforeMm : 0;
  const after = afterMm > 0 ? (slopeThird * (1 - ownThird) * betweenMm) / afterMm : 0;
  into[0] = -before;
  into[1] = second - own + before;
  into[2] = 1 - second + own - after;
  into[3] = after;
}

/** Keys' weights between pixels, into a list that is there already. */
export function evenWeights(part: number, into: Float64Array): void {
  const weights = cubicWeights(part);
  into[0] = weights[0];
  into[1] = weights[1];
  into[2] = weights[2];
  into[3] = weights[3];
}
