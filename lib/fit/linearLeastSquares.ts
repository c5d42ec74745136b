import { Matrix, QrDecomposition } from 'ml-matrix';
import { inverseInformation } from './gaussNewton';

export interface LinearFit {
  ok: true;
  coefficients: number[];
  standardErrors: number[];
  residuals: number[];
  residualSd: number;
  degreesOfFreedom: number;
  /** Diagonal of the hat matrix. */
  leverage: number[];
}

/**
 * Ordinary linear least squares by QR of the column-scaled design, with one step of refinement on the
 * residuals (Björck 1967, BIT 7, 257-278); the normal equations would square the condition number.
 *
 * `design`: one row per observation (with a column of 1 for an intercept). Throws RangeError on mismatched
 * lengths or too few rows; returns `{ ok: false }` when the columns are dependent.
 */
export function linearLeastSquares(
  design: readonly (readonly number[])[],
  observed: readonly number[],
): LinearFit | { ok: false; reason: 'dependentColumns' } {
  const count = design[0]?.length ?? 0;
  if (count === 0 || design.length < count || observed.length !== design.length) {
    throw new RangeError('linearLeastSquares requires a row per observation, at least as many as columns');
  }
  const rows = new Matrix(design.map((row) => [...row]));
  const scales = Array.from({ length: count }, (_, j) => rows.getColumnVector(j).norm());
  if (!scales.every((scale) => scale > 0)) return { ok: false, reason: 'dependentColumns' };
  const scaled = rows.clone();
  scales.forEach((scale, j) => scaled.mulColumn(j, 1 / scale));
  const qr = new QrDecomposition(scaled);
  const diagonal = qr.upperTriangularMatrix.diagonal().map(Math.abs);
  if (Math.min(...diagonal) < 1e-14 * Math.max(...diagonal)) return { ok: false, reason: 'dependentColumns' };
  const target = Matrix.columnVector([...observed]);
  const first = qr.solve(target);
  const solution = Matrix.add(first, qr.solve(Matrix.sub(target, scaled.mmul(first))));
  const residuals = Matrix.sub(target, scaled.mmul(solution)).getColumn(0);
  const degreesOfFreedom = design.length - count;
  const rss = residuals.reduce((sum, residual) => sum + residual * residual, 0);
  const residualSd = degreesOfFreedom > 0 ? Math.sqrt(rss / degreesOfFreedom) : NaN;
  const inverse = inverseInformation(
    rows,
    scales.map((_, j) => j),
  );
  if (inverse === null) return { ok: false, reason: 'dependentColumns' };
  const orthogonal = qr.orthogonalMatrix;
  return {
    ok: true,
    coefficients: scales.map((scale, j) => solution.get(j, 0) / scale),
    standardErrors: scales.map((_, j) => residualSd * Math.sqrt(inverse.get(j, j))),
    residuals,
    residualSd,
    degreesOfFreedom,
    leverage: Array.from({ length: design.length }, (_, i) =>
      orthogonal.getRow(i).reduce((sum, value) => sum + value * value, 0),
    ),
  };
}
