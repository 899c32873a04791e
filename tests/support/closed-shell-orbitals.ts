import { type OrbitalIntegrals, packedPair } from '../../engine/integrals/orbital-integrals';
import { symmetricEigen } from '../../engine/linear-algebra/symmetric-eigen';
import { rotateOrbitals } from './random-orbital-integrals';

/**
 * The same Hamiltonian over canonical orbitals of a closed-shell self-consistent field, by plain iteration from
 * the orbitals given; throws if that does not converge to 1e-13 in the occupied–virtual Fock elements.
 */
export function closedShellOrbitals(integrals: OrbitalIntegrals, occupied: number): OrbitalIntegrals {
  const n = integrals.orbitalCount;
  let current = integrals;
  for (let iteration = 0; iteration < 500; iteration++) {
    const fock = current.oneElectron.slice();
    const { twoElectron } = current;
    for (let p = 0; p < n; p++) {
      for (let q = 0; q < n; q++) {
        for (let k = 0; k < occupied; k++) {
          fock[p * n + q] += 2 * twoElectron[packedPair(packedPair(p, q), packedPair(k, k))];
          fock[p * n + q] -= twoElectron[packedPair(packedPair(p, k), packedPair(q, k))];
        }
      }
    }
    let gradient = 0;
    for (let i = 0; i < occupied; i++) {
      for (let a = occupied; a < n; a++) gradient = Math.max(gradient, Math.abs(fock[i * n + a]));
    }
    current = rotateOrbitals(current, symmetricEigen(fock, n).vectors);
    if (gradient < 1e-13) return current;
  }
  throw new Error('plain self-consistent field did not converge');
}
