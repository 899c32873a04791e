import { kernelForm } from '../kernels/form';
import { fastSymmetricEigen } from './fast-symmetric-eigen';
import { diagonaliseTridiagonal } from './implicit-ql';
import { MOST_ROWS_IN_CLOSED_FORM, smallSymmetricEigen } from './small-eigen';
import { accumulateReflections, tridiagonalise } from './tridiagonalise';

export interface SymmetricEigen {
  /** rising */
  readonly values: Float64Array;
  /** row-major n×n; column k belongs to value k; orthonormal */
  readonly vectors: Float64Array;
}

/** Rows below which the plain form is as fast. */
const FEWEST_FAST = 24;

/**
 * All eigenvalues and eigenvectors of a symmetric matrix: Householder tridiagonalisation, then the implicit QL
 * method, or divide and conquer in the fast form. Errors of values and residuals are a few units in the last place
 * of the largest element.
 *
 * @param matrix - n×n, row-major; only the lower triangle is read
 * @throws RangeError if an entry is not finite
 * @throws EigenvaluesNotConverged
 *
 * Source: A. Dubrulle, R. S. Martin, J. H. Wilkinson, Numer. Math. 12, 377 (1968); the reduction:
 * R. S. Martin, C. Reinsch, J. H. Wilkinson, Numer. Math. 11, 181 (1968). Cost: about 5n³.
 */
export function symmetricEigen(matrix: Float64Array, n: number): SymmetricEigen {
  let largest = 0;
  for (let i = 0; i < n * n; i++) {
    if (!Number.isFinite(matrix[i]))
      throw new RangeError('symmetricEigen: the matrix has an entry that is not finite');
    largest = Math.max(largest, Math.abs(matrix[i]));
  }
  if (n <= MOST_ROWS_IN_CLOSED_FORM) return smallSymmetricEigen(matrix, n);
  // squares of elements must neither overflow nor vanish
  const scale = scaleNear(largest);
  if (n >= FEWEST_FAST && kernelForm() === 'fast') return fastSymmetricEigen(matrix, n, scale);
  const reduced = matrix.slice(0, n * n);
  for (let i = 0; i < n * n; i++) reduced[i] /= scale;
  const { diagonal, offDiagonal, halfSquares } = tridiagonalise(reduced, n);
  const columns = accumulateReflections(reduced, halfSquares, n);
  diagonaliseTridiagonal(diagonal, offDiagonal, columns, n);
  return inRisingOrder(diagonal, columns, n, scale);
}

/** A power of two near the number, so that scaling rounds nothing; 1 for zero. */
function scaleNear(largest: number): number {
  return largest === 0 ? 1 : 2 ** Math.max(-1000, Math.min(1000, Math.round(Math.log2(largest))));
}

function inRisingOrder(
  diagonal: Float64Array,
  columns: Float64Array,
  n: number,
  scale: number,
): SymmetricEigen {
  const order = Int32Array.from(diagonal.keys()).sort((a, b) => diagonal[a] - diagonal[b]);
  const vectors = new Float64Array(n * n);
  for (let row = 0; row < n; row++) {
    for (let k = 0; k < n; k++) vectors[row * n + k] = columns[row * n + order[k]];
  }
  return { values: Float64Array.from(diagonal, (value) => value * scale).sort(), vectors };
}
