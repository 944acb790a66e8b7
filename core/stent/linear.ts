/** Lower triangle L of a symmetric positive matrix, A = L·Lᵀ (Cholesky); undefined where A is not positive. */
export function cholesky(matrix: readonly Float64Array[]): readonly Float64Array[] | undefined {
  const n = matrix.length;
  const lower = Array.from({ length: n }, () => new Float64Array(n));
  for (let row = 0; row < n; row += 1) {
    const own = lower[row] as Float64Array;
    const given = matrix[row] as Float64Array;
    for (let column = 0; column <= row; column += 1) {
      const other = lower[column] as Float64Array;
      let sum = given[column] as number;
      for (let k = 0; k < column; k += 1) sum -= (own[k] as number) * (other[k] as number);
      if (row !== column) own[column] = sum / (other[column] as number);
      else if (sum > 0) own[row] = Math.sqrt(sum);
      else return undefined;
    }
  }
  return lower;
}

/** x of L·x = b. */
export function forwardSolve(lower: readonly Float64Array[], b: Float64Array): Float64Array {
  const x = new Float64Array(b.length);
  for (let row = 0; row < b.length; row += 1) {
    const own = lower[row] as Float64Array;
    let sum = b[row] as number;
    for (let k = 0; k < row; k += 1) sum -= (own[k] as number) * (x[k] as number);
    x[row] = sum / (own[row] as number);
  }
  return x;
}

/** x of Lᵀ·x = b. */
export function backwardSolve(lower: readonly Float64Array[], b: Float64Array): Float64Array {
  const n = b.length;
  const x = new Float64Array(n);
  for (let row = n - 1; row >= 0; row -= 1) {
    let sum = b[row] as number;
    for (let k = row + 1; k < n; k += 1) sum -= (lower[k]?.[row] as number) * (x[k] as number);
    x[row] = sum / (lower[row]?.[row] as number);
  }
  return x;
}

/** x of A·x = b for a symmetric positive A. Throws for another: the caller has made it positive. */
export function solveSymmetric(matrix: readonly Float64Array[], b: Float64Array): Float64Array {
  const lower = cholesky(matrix);
  if (lower === undefined)
    throw new RangeError(`invalid matrix: not positive, ${matrix.length} rows`);
  return backwardSolve(lower, forwardSolve(lower, b));
}

/** A⁻¹ of a symmetric positive A; undefined for another. */
export function inverseSymmetric(
  matrix: readonly Float64Array[],
): readonly Float64Array[] | undefined {
  const lower = cholesky(matrix);
  if (lower === undefined) return undefined;
  return matrix.map((_, index) => {
    const unit = new Float64Array(matrix.length);
    unit[index] = 1;
    return backwardSolve(lower, forwardSolve(lower, unit));
  });
}
