import { congruence, multiply } from '../linear-algebra/dense';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';

/** Orbitals over n functions: `coefficients` n×m row-major (functions × orbitals), energies rising. */
export interface Orbitals {
  readonly coefficients: Float64Array;
  readonly energies: Float64Array;
}

/** Solves FC = SCε in the orthonormal functions X (n×m). */
export function diagonaliseFock(fock: Float64Array, x: Float64Array, n: number, m: number): Orbitals {
  const { values, vectors } = symmetricEigen(congruence(fock, x, n, m), m);
  return { coefficients: multiply(x, vectors, n, m, m), energies: values };
}

/** D = Σ_i C_i C_iᵀ over the first `occupied` orbitals (one electron each), n×n. */
export function buildDensity(
  coefficients: Float64Array,
  n: number,
  m: number,
  occupied: number,
): Float64Array {
  const density = new Float64Array(n * n);
  for (let mu = 0; mu < n; mu++) {
    for (let nu = 0; nu <= mu; nu++) {
      let sum = 0;
      for (let i = 0; i < occupied; i++) sum += coefficients[mu * m + i] * coefficients[nu * m + i];
      density[mu * n + nu] = sum;
      density[nu * n + mu] = sum;
    }
  }
  return density;
}

/**
 * Orbitals of another geometry (or of an earlier iteration) made orthonormal in this overlap:
 * C ← C(CᵀSC)^(−1/2), which changes them least (Löwdin).
 *
 * @returns n×k row-major, or undefined where the orbitals have become linearly dependent
 */
export function reorthonormalise(
  coefficients: Float64Array,
  overlap: Float64Array,
  n: number,
  k: number,
): Float64Array | undefined {
  // a spin without electrons
  if (k === 0) return new Float64Array(0);
  const { values, vectors } = symmetricEigen(congruence(overlap, coefficients, n, k), k);
  if (!(values[0] > 1e-6)) return undefined;
  const scaled = new Float64Array(k * k);
  const inverseRoot = new Float64Array(k * k);
  for (let i = 0; i < k; i++)
    for (let j = 0; j < k; j++) scaled[i * k + j] = vectors[i * k + j] / Math.sqrt(values[j]);
  for (let i = 0; i < k; i++) {
    for (let j = 0; j < k; j++) {
      let sum = 0;
      for (let p = 0; p < k; p++) sum += scaled[i * k + p] * vectors[j * k + p];
      inverseRoot[i * k + j] = sum;
    }
  }
  return multiply(coefficients, inverseRoot, n, k, k);
}
