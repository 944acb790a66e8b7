/**
 * Weights of the four samples around a place between the second and the third, `part` beyond the second: cubic
 * convolution with a = −½ (Keys 1981, doi 10.1109/TASSP.1981.1163711), exact for polynomials up to second order.
 */
export function cubicWeights(part: number): readonly [number, number, number, number] {
  const t = part;
  const tt = t * t;
  const ttt = tt * t;
  return [
    (-ttt + 2 * tt - t) / 2,
    (3 * ttt - 5 * tt + 2) / 2,
    (-3 * ttt + 4 * tt + t) / 2,
    (ttt - tt) / 2,
  ];
}
