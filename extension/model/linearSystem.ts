/** LU factors of a small dense matrix, row-major, with partial pivoting. Deliberately no allocation: the caller owns the arrays. */

/** Overwrites `matrix` (n×n) by its factors and `pivots` by the row exchanges. A singular column keeps a tiny pivot. */
export function factorise(matrix: Float64Array, pivots: Int32Array, n: number): void {
  for (let column = 0; column < n; column++) {
    let best = column;
    for (let row = column + 1; row < n; row++) {
      if (Math.abs(matrix[row * n + column] as number) > Math.abs(matrix[best * n + column] as number)) best = row;
    }
    pivots[column] = best;
    if (best !== column) swapRows(matrix, n, column, best);
    const pivot = (matrix[column * n + column] as number) || Number.MIN_VALUE;
    for (let row = column + 1; row < n; row++) {
      const factor = (matrix[row * n + column] as number) / pivot;
      matrix[row * n + column] = factor;
      if (factor === 0) continue;
      for (let k = column + 1; k < n; k++) (matrix[row * n + k] as number) -= factor * (matrix[column * n + k] as number);
    }
  }
}

/** Solves with the factors of `factorise`; overwrites `vector` by the solution. */
export function solveFactorised(matrix: Float64Array, pivots: Int32Array, n: number, vector: Float64Array): void {
  for (let row = 0; row < n; row++) {
    const other = pivots[row] as number;
    if (other !== row) {
      const kept = vector[row] as number;
      vector[row] = vector[other] as number;
      vector[other] = kept;
    }
  }
  for (let row = 1; row < n; row++) {
    let sum = vector[row] as number;
    for (let k = 0; k < row; k++) sum -= (matrix[row * n + k] as number) * (vector[k] as number);
    vector[row] = sum;
  }
  for (let row = n - 1; row >= 0; row--) {
    let sum = vector[row] as number;
    for (let k = row + 1; k < n; k++) sum -= (matrix[row * n + k] as number) * (vector[k] as number);
    vector[row] = sum / ((matrix[row * n + row] as number) || Number.MIN_VALUE);
  }
}

function swapRows(matrix: Float64Array, n: number, one: number, other: number): void {
  for (let k = 0; k < n; k++) {
    const kept = matrix[one * n + k] as number;
    matrix[one * n + k] = matrix[other * n + k] as number;
    matrix[other * n + k] = kept;
  }
}
