import { SweepQueue } from './column-rotations';
import { accumulateReflections, tridiagonalise } from './tridiagonalise';

export interface SymmetricEigen {
  /** rising */
  readonly values: Float64Array;
  /** row-major n×n; column k belongs to value k; orthonormal */
  readonly vectors: Float64Array;
}

/** The iteration for one eigenvalue went on beyond `MOST_SWEEPS`; not known to happen for finite matrices. */
export class EigenvaluesNotConverged extends Error {
  override readonly name = 'EigenvaluesNotConverged';
}

/** Sweeps for one eigenvalue; two or three are usual. */
const MOST_SWEEPS = 60;
/** An off-diagonal element this small beside its diagonal neighbours is zero. */
const NEGLIGIBLE = Number.EPSILON;

/**
 * All eigenvalues and eigenvectors of a symmetric matrix: Householder tridiagonalisation, then the implicit QL
 * method. Errors of values and residuals are a few units in the last place of the largest element.
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
  // squares of elements must neither overflow nor vanish
  const scale = scaleNear(largest);
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

/**
 * Implicit QL sweeps until the tridiagonal matrix is diagonal, in place; `columns` are rotated along.
 *
 * @param offDiagonal - element i stands beside the diagonal elements i − 1 and i
 */
function diagonaliseTridiagonal(
  diagonal: Float64Array,
  offDiagonal: Float64Array,
  columns: Float64Array,
  n: number,
): void {
  const d = diagonal;
  const e = new Float64Array(n);
  e.set(offDiagonal.subarray(1));
  const sweeps = new SweepQueue(n);
  for (let l = 0; l < n; l++) {
    for (let count = 0; ; count++) {
      let m = l;
      while (m < n - 1 && Math.abs(e[m]) > NEGLIGIBLE * (Math.abs(d[m]) + Math.abs(d[m + 1]))) m++;
      if (m === l) break;
      if (count === MOST_SWEEPS) {
        throw new EigenvaluesNotConverged(`eigenvalue ${l} of ${n} after ${count} sweeps`);
      }
      if (!sweeps.hasRoomFor(m - l)) sweeps.applyTo(columns);
      sweepOnce(d, e, l, m, sweeps);
    }
  }
  sweeps.applyTo(columns);
}

/** One sweep over the unreduced block l … m, chasing the bulge upwards from m; less if the block splits on the way. */
function sweepOnce(d: Float64Array, e: Float64Array, l: number, m: number, sweeps: SweepQueue): void {
  sweeps.begin(m);
  const slope = (d[l + 1] - d[l]) / (2 * e[l]);
  const root = Math.hypot(slope, 1);
  // d(m) less the shift, the eigenvalue of the leading 2×2 block nearer to d(l)
  let g = d[m] - d[l] + e[l] / (slope + (slope < 0 ? -root : root));
  let s = 1;
  let c = 1;
  let p = 0;
  for (let i = m - 1; i >= l; i--) {
    const f = s * e[i];
    const b = c * e[i];
    const r = Math.sqrt(f * f + g * g);
    e[i + 1] = r;
    if (r === 0) {
      d[i + 1] -= p;
      e[m] = 0;
      return;
    }
    s = f / r;
    c = g / r;
    g = d[i + 1] - p;
    const t = (d[i] - g) * s + 2 * c * b;
    p = s * t;
    d[i + 1] = g + p;
    g = c * t - b;
    sweeps.add(c, s);
  }
  d[l] -= p;
  e[l] = g;
  e[m] = 0;
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
