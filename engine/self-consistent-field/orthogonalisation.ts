import { symmetricEigen } from '../linear-algebra/symmetric-eigen';

/**
 * Overlap eigenvalues below this are dropped. Small enough that a sound basis loses nothing, large enough that
 * 1/√s does not amplify the integrals' errors (about 1e-14) beyond 1e-9 hartree.
 */
export const LINEAR_DEPENDENCE_THRESHOLD = 1e-7;

export interface Orthogonalisation {
  /** n×m, row-major: XᵀSX = 1 */
  readonly transformation: Float64Array;
  readonly orbitalCount: number;
  /** n − m, the user is told */
  readonly dropped: number;
  readonly smallestEigenvalue: number;
}

/**
 * Canonical orthogonalisation X = U·s^(−1/2), without the directions in which the basis is nearly linearly
 * dependent.
 *
 * @param overlap - n×n, row-major
 * Source: P.-O. Löwdin, Adv. Quantum Chem. 5, 185 (1970); Szabo and Ostlund, sec. 3.4.5.
 */
export function orthogonalise(
  overlap: Float64Array,
  n: number,
  threshold = LINEAR_DEPENDENCE_THRESHOLD,
): Orthogonalisation {
  const { values, vectors } = symmetricEigen(overlap, n);
  const dropped = values.findIndex((value) => value >= threshold);
  const skip = dropped < 0 ? n : dropped;
  const m = n - skip;
  const transformation = new Float64Array(n * m);
  for (let k = 0; k < m; k++) {
    const scale = 1 / Math.sqrt(values[skip + k]);
    for (let i = 0; i < n; i++) transformation[i * m + k] = vectors[i * n + skip + k] * scale;
  }
  return { transformation, orbitalCount: m, dropped: skip, smallestEigenvalue: values[0] };
}
