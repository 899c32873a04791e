import { EigenvalueDecomposition, Matrix } from 'ml-matrix';

export interface SymmetricEigen {
  /** rising */
  readonly values: Float64Array;
  /** row-major n×n; column k belongs to value k; orthonormal */
  readonly vectors: Float64Array;
}

/**
 * All eigenvalues and eigenvectors of a symmetric matrix.
 *
 * @param matrix - n×n, row-major; only assumed symmetric to rounding
 * @throws RangeError if an entry is not finite (the library's iteration would not end)
 */
export function symmetricEigen(matrix: Float64Array, n: number): SymmetricEigen {
  for (let i = 0; i < n * n; i++) {
    if (!Number.isFinite(matrix[i]))
      throw new RangeError('symmetricEigen: the matrix has an entry that is not finite');
  }
  if (n === 0) return { values: new Float64Array(0), vectors: new Float64Array(0) };
  const decomposition = new EigenvalueDecomposition(Matrix.from1DArray(n, n, matrix as unknown as number[]), {
    assumeSymmetric: true,
  });
  const values = Float64Array.from(decomposition.realEigenvalues);
  const vectors = new Float64Array(n * n);
  const columns = decomposition.eigenvectorMatrix;
  for (let i = 0; i < n; i++) for (let k = 0; k < n; k++) vectors[i * n + k] = columns.get(i, k);
  return { values, vectors };
}
