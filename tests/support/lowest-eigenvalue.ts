import { EigenvalueDecomposition, Matrix } from 'ml-matrix';

/** A symmetric matrix: its diagonal, and the elements below it that are not zero. */
export interface SparseSymmetric {
  readonly diagonal: readonly number[];
  readonly rows: readonly number[];
  readonly columns: readonly number[];
  readonly values: readonly number[];
}

const RESIDUAL = 1e-6;
const MOST_VECTORS = 60;

/**
 * Lowest eigenvalue by plain subspace iteration with the diagonal as preconditioner, from the lowest diagonal element.
 * The error is of the order of the square of the residual, 1e-12.
 */
export function lowestEigenvalue({ diagonal, rows, columns, values }: SparseSymmetric): number {
  const size = diagonal.length;
  const multiply = (vector: Float64Array) => {
    const product = vector.map((value, i) => value * diagonal[i]!);
    for (let k = 0; k < values.length; k++) {
      product[rows[k]!]! += values[k]! * vector[columns[k]!]!;
      product[columns[k]!]! += values[k]! * vector[rows[k]!]!;
    }
    return product;
  };
  let next = new Float64Array(size);
  next[diagonal.indexOf(Math.min(...diagonal))] = 1;
  const basis: Float64Array[] = [];
  const images: Float64Array[] = [];
  const projected: number[][] = [];
  for (;;) {
    basis.push(next);
    images.push(multiply(next));
    projected.push(basis.map((vector) => dot(vector, images.at(-1)!)));
    const small = new Matrix(
      basis.map((_, i) => basis.map((_, j) => projected[Math.max(i, j)]![Math.min(i, j)]!)),
    );
    const { realEigenvalues, eigenvectorMatrix } = new EigenvalueDecomposition(small, {
      assumeSymmetric: true,
    });
    const lowest = realEigenvalues.indexOf(Math.min(...realEigenvalues));
    const value = realEigenvalues[lowest]!;
    const weights = eigenvectorMatrix.getColumn(lowest);
    const residual = new Float64Array(size);
    for (const [k, weight] of weights.entries()) {
      for (let i = 0; i < size; i++) residual[i]! += weight * (images[k]![i]! - value * basis[k]![i]!);
    }
    if (Math.sqrt(dot(residual, residual)) < RESIDUAL || basis.length === size) return value;
    if (basis.length === MOST_VECTORS) throw new Error('the lowest eigenvalue did not converge');
    next = residual.map((component, i) => {
      const gap = diagonal[i]! - value;
      return component / (Math.abs(gap) < 1e-3 ? 1e-3 : gap);
    });
    // twice, as one pass loses digits
    for (let pass = 0; pass < 2; pass++) {
      for (const vector of basis) {
        const overlap = dot(vector, next);
        for (let i = 0; i < size; i++) next[i]! -= overlap * vector[i]!;
      }
      const length = Math.sqrt(dot(next, next));
      next = next.map((component) => component / length);
    }
  }
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
}
