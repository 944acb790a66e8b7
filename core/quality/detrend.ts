/** Degrees of freedom that a second-order surface takes: 1, x, y, xy, x², y². */
export const QUADRATIC_TERMS = 6;

/**
 * What is left of a full rectangle of values when its least-squares second-order surface is taken away. Over such a
 * rectangle 1, x, y, xy, x² − ⟨x²⟩ and y² − ⟨y²⟩ are orthogonal to each other when x and y are counted from its
 * middle, so each coefficient is one projection. A side shorter than 3 has no curvature of its own.
 *
 * @param values row after row, `columns` × `rows` of them
 */
export function detrendQuadratic(
  values: Float64Array,
  columns: number,
  rows: number,
): Float64Array<ArrayBuffer> {
  if (values.length !== columns * rows)
    throw new RangeError(`invalid rectangle: ${values.length} values, ${columns} × ${rows}`);
  const [x, xx, sumXX, sumX4] = axisPolynomials(columns);
  const [y, yy, sumYY, sumY4] = axisPolynomials(rows);
  let [c, cx, cy, cxy, cxx, cyy] = [0, 0, 0, 0, 0, 0];
  for (let row = 0, index = 0; row < rows; row += 1) {
    let [s, sx, sxx] = [0, 0, 0];
    for (let column = 0; column < columns; column += 1, index += 1) {
      const value = values[index] as number;
      s += value;
      sx += value * (x[column] as number);
      sxx += value * (xx[column] as number);
    }
    c += s;
    cx += sx;
    cxx += sxx;
    cy += s * (y[row] as number);
    cxy += sx * (y[row] as number);
    cyy += s * (yy[row] as number);
  }
  c /= columns * rows;
  cx /= sumXX * rows || 1;
  cy /= sumYY * columns || 1;
  cxy /= sumXX * sumYY || 1;
  cxx /= sumX4 * rows || 1;
  cyy /= sumY4 * columns || 1;
  const rest = new Float64Array(values.length);
  for (let row = 0, index = 0; row < rows; row += 1) {
    const level = c + cy * (y[row] as number) + cyy * (yy[row] as number);
    const slope = cx + cxy * (y[row] as number);
    for (let column = 0; column < columns; column += 1, index += 1)
      rest[index] =
        (values[index] as number) -
        level -
        slope * (x[column] as number) -
        cxx * (xx[column] as number);
  }
  return rest;
}

/** Places along one side from its middle, their squares less the mean square, and the sums of squares of both. */
function axisPolynomials(count: number): readonly [Float64Array, Float64Array, number, number] {
  const places = Float64Array.from({ length: count }, (_, index) => index - (count - 1) / 2);
  const sumOfSquares = (list: Float64Array): number => list.reduce((sum, v) => sum + v * v, 0);
  const meanSquare = sumOfSquares(places) / count;
  // Two places have no curvature: what rounding leaves of it must not be divided by.
  const curved = places.map((place) => (count < 3 ? 0 : place * place - meanSquare));
  return [places, curved, sumOfSquares(places), sumOfSquares(curved)];
}
