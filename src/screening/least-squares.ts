/**
 * Weighted linear least squares by the normal equations, with a touch of ridge (1e-9 of the diagonal) so that
 * points that stand in one place give the flattest curve, not a failure. For few, scaled columns.
 *
 * @example
 * leastSquares([[1, 0], [1, 1], [1, 2]], [1, 3, 5], [1, 1, 1]) .map(Math.round) // => [1, 2]
 */
export function leastSquares(
  rows: readonly (readonly number[])[],
  values: readonly number[],
  weights: readonly number[],
): number[] {
  const size = rows[0]?.length ?? 0;
  const matrix = Array.from({ length: size }, () => new Array<number>(size + 1).fill(0));
  rows.forEach((row, i) => {
    for (let a = 0; a < size; a++) {
      for (let b = 0; b < size; b++) matrix[a][b] += weights[i] * row[a] * row[b];
      matrix[a][size] += weights[i] * row[a] * values[i];
    }
  });
  const ridge = 1e-9 * Math.max(1e-300, ...matrix.map((row, a) => row[a]));
  for (let a = 0; a < size; a++) matrix[a][a] += ridge;
  return solve(matrix);
}

/** Gauss with pivots on an augmented matrix, in place. */
function solve(matrix: number[][]): number[] {
  const size = matrix.length;
  for (let a = 0; a < size; a++) {
    let pivot = a;
    for (let b = a + 1; b < size; b++) if (Math.abs(matrix[b][a]) > Math.abs(matrix[pivot][a])) pivot = b;
    [matrix[a], matrix[pivot]] = [matrix[pivot], matrix[a]];
    for (let b = a + 1; b < size; b++) {
      const factor = matrix[b][a] / matrix[a][a];
      for (let c = a; c <= size; c++) matrix[b][c] -= factor * matrix[a][c];
    }
  }
  const solution = new Array<number>(size).fill(0);
  for (let a = size - 1; a >= 0; a--) {
    let sum = matrix[a][size];
    for (let c = a + 1; c < size; c++) sum -= matrix[a][c] * solution[c];
    solution[a] = sum / matrix[a][a];
  }
  return solution;
}
