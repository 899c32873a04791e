import { congruence, multiply } from '../linear-algebra/dense';
import { symmetricEigen } from '../linear-algebra/symmetric-eigen';
import { columnRange } from './mean-field';

/**
 * Turns orbitals within their classes (occupied, virtual, …) so that the Fock matrix is diagonal in each; the
 * determinant and its energy stay.
 *
 * @param coefficients - n×m row-major
 * @param ends - where the classes end, rising; the last class runs to m
 */
export function semicanonical(
  fock: Float64Array,
  coefficients: Float64Array,
  n: number,
  m: number,
  ends: readonly number[],
): { readonly orbitals: Float64Array; readonly orbitalEnergies: Float64Array } {
  const orbitals = new Float64Array(n * m);
  const orbitalEnergies = new Float64Array(m);
  let first = 0;
  for (const end of [...ends, m]) {
    const size = end - first;
    if (size > 0) {
      const block = columnRange(coefficients, n, m, first, end);
      const { values, vectors } = symmetricEigen(congruence(fock, block, n, size), size);
      const turned = multiply(block, vectors, n, size, size);
      for (let i = 0; i < n; i++) {
        orbitals.set(turned.subarray(i * size, (i + 1) * size), i * m + first);
      }
      orbitalEnergies.set(values, first);
    }
    first = end;
  }
  return { orbitals, orbitalEnergies };
}
