import { exchangeInto } from '../integrals/coulomb-exchange';
import type { OrbitalIntegrals } from '../integrals/orbital-integrals';
import { addScaledInto, multiply } from '../linear-algebra/dense';
import type { DeterminantSpace } from './determinant-space';
import type { BareProduct } from './hamiltonian-product';
import { putSector, takeSector } from './sector';
import { isTwoElectrons } from './size';

export function isTwoElectronSpace(
  { alpha, beta, maximumRank }: DeterminantSpace,
  integrals: OrbitalIntegrals,
): boolean {
  return isTwoElectrons(alpha.electrons, beta.electrons, maximumRank, integrals.beta !== undefined);
}

/**
 * H·c of one alpha and one beta electron. Strings stand in order of their only orbital, so that c is a matrix over
 * orbitals, and σ = h·c + c·h + K with K(p,r) = Σ (pq|rs)·c(q,s): an exchange matrix. It takes the packed integrals as
 * they stand, each once for all the products that it appears in; lists for so few electrons in many orbitals would be
 * longer than the integrals.
 *
 * Cost: orbitals⁴/8 whatever the representation, twice that without parity.
 */
export function prepareTwoElectronProduct(space: DeterminantSpace, integrals: OrbitalIntegrals): BareProduct {
  const { orbitalCount: n, oneElectron, twoElectron } = integrals;
  const exchange = new Float64Array(n * n);
  return (sector, vector, product, parity) => {
    const whole = new Float64Array(space.dimension);
    putSector(sector, vector, whole);
    const sum = multiply(oneElectron, whole, n, n, n);
    addScaledInto(sum, 1, multiply(whole, oneElectron, n, n, n));
    for (const of of parity === 0 ? [1, -1] : [parity]) {
      exchangeInto(parity === 0 ? evenOrOdd(whole, n, of) : whole, of, twoElectron, n, exchange);
      addScaledInto(sum, 1, exchange);
    }
    product.set(takeSector(sector, sum));
  };
}

/** (A ± Aᵀ)/2 */
function evenOrOdd(matrix: Float64Array, n: number, parity: number): Float64Array {
  return matrix.map((value, place) => (value + parity * matrix[(place % n) * n + Math.trunc(place / n)]) / 2);
}
