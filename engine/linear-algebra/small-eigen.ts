import type { SymmetricEigen } from './symmetric-eigen';

/** Most rows that need no iteration. */
export const MOST_ROWS_IN_CLOSED_FORM = 2;

/**
 * Eigenvalues and eigenvectors of a symmetric matrix of one or two rows, which small molecules have by the dozen: the
 * rotation that annihilates the element below the diagonal.
 *
 * @param matrix - n×n, row-major, finite; only the lower triangle is read
 *
 * Source: H. Rutishauser, Numer. Math. 9, 1 (1966), for the smaller of the two angles.
 */
export function smallSymmetricEigen(matrix: Float64Array, n: number): SymmetricEigen {
  if (n < 2) return { values: matrix.slice(0, n), vectors: new Float64Array(n).fill(1) };
  const [first, , below, second] = matrix;
  let tangent = 0;
  if (below !== 0) {
    // halved first: the difference of two large numbers may not be one
    const cotangent = (second / 2 - first / 2) / below;
    tangent = 1 / (Math.abs(cotangent) + Math.hypot(cotangent, 1));
    if (cotangent < 0) tangent = -tangent;
  }
  const cosine = 1 / Math.sqrt(1 + tangent * tangent);
  const sine = tangent * cosine;
  const low = first - tangent * below;
  const high = second + tangent * below;
  // columns (cos, −sin) and (sin, cos)
  return low <= high
    ? { values: Float64Array.of(low, high), vectors: Float64Array.of(cosine, sine, -sine, cosine) }
    : { values: Float64Array.of(high, low), vectors: Float64Array.of(sine, cosine, cosine, -sine) };
}
