import { CholeskyDecomposition, Matrix } from 'ml-matrix';

/** A symmetric matrix kept flat, size x size. */
export function toMatrix(flat: ArrayLike<number>, size: number): Matrix {
  return Matrix.from1DArray(size, size, Array.from(flat));
}

/** Inverse of a symmetric positive definite matrix, or null when it is not. */
export function invertPositive(flat: ArrayLike<number>, size: number): Float64Array | null {
  const cholesky = new CholeskyDecomposition(toMatrix(flat, size));
  if (!cholesky.isPositiveDefinite()) return null;
  const inverse = cholesky.solve(Matrix.eye(size));
  const symmetric = Matrix.add(inverse, inverse.transpose()).mul(0.5).to1DArray();
  return symmetric.every(Number.isFinite) ? Float64Array.from(symmetric) : null;
}

/**
 * Solve (matrix + ridge diag) x = b, raising the ridge until the Cholesky factorisation succeeds.
 * @param scale positive diagonal of the ridge (here the prior precision)
 */
export function solveWithRidge(
  flat: ArrayLike<number>,
  scale: ArrayLike<number>,
  b: ArrayLike<number>,
): { x: Float64Array; ridge: number } | null {
  const size = b.length;
  for (let ridge = 0, tries = 0; tries < 40; tries++, ridge = ridge === 0 ? 0.1 : ridge * 4) {
    const matrix = toMatrix(flat, size);
    for (let i = 0; i < size; i++) matrix.set(i, i, matrix.get(i, i) + ridge * scale[i]!);
    const cholesky = new CholeskyDecomposition(matrix);
    if (!cholesky.isPositiveDefinite()) continue;
    const x = Float64Array.from(cholesky.solve(Matrix.columnVector(Array.from(b))).to1DArray());
    if (x.every(Number.isFinite)) return { x, ridge };
  }
  return null;
}
