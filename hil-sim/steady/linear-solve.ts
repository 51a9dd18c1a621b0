// Dense linear equations by Gaussian elimination with partial pivoting, in place.
// source: Golub & Van Loan, Matrix Computations, 3.4 (from memory)

/** Replaces `right` by the solution of matrix · x = right (row-major, n by n, destroyed); returns the sign of the determinant, 0 if singular. */
export function solveLinear(matrix: Float64Array, right: Float64Array, n: number): number {
  let sign = 1;
  for (let column = 0; column < n; column++) {
    const pivot = pivotRow(matrix, column, n);
    const value = matrix[pivot * n + column];
    if (!(value !== 0)) return 0;
    if (value < 0) sign = -sign;
    if (pivot !== column) {
      swapRows(matrix, right, pivot, column, n);
      sign = -sign;
    }
    eliminateBelow(matrix, right, column, n);
  }
  substituteBack(matrix, right, n);
  return sign;
}

function pivotRow(matrix: Float64Array, column: number, n: number): number {
  let best = column;
  for (let row = column + 1; row < n; row++) {
    if (Math.abs(matrix[row * n + column]) > Math.abs(matrix[best * n + column])) best = row;
  }
  return best;
}

function swapRows(matrix: Float64Array, right: Float64Array, a: number, b: number, n: number): void {
  for (let j = 0; j < n; j++) {
    const kept = matrix[a * n + j];
    matrix[a * n + j] = matrix[b * n + j];
    matrix[b * n + j] = kept;
  }
  const kept = right[a];
  right[a] = right[b];
  right[b] = kept;
}

function eliminateBelow(matrix: Float64Array, right: Float64Array, column: number, n: number): void {
  for (let row = column + 1; row < n; row++) {
    const factor = matrix[row * n + column] / matrix[column * n + column];
    if (factor === 0) continue;
    for (let j = column + 1; j < n; j++) matrix[row * n + j] -= factor * matrix[column * n + j];
    right[row] -= factor * right[column];
  }
}

function substituteBack(matrix: Float64Array, right: Float64Array, n: number): void {
  for (let row = n - 1; row >= 0; row--) {
    let sum = right[row];
    for (let j = row + 1; j < n; j++) sum -= matrix[row * n + j] * right[j];
    right[row] = sum / matrix[row * n + row];
  }
}
