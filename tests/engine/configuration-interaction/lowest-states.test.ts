import { describe, expect, it } from 'vitest';
import { occupationString } from '../../../engine/configuration-interaction/determinants';
import { hamiltonianElement } from '../../../engine/configuration-interaction/matrix-elements';
import { solveConfigurationInteraction } from '../../../engine/configuration-interaction/solve';
import type { OrbitalIntegrals } from '../../../engine/integrals/orbital-integrals';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { hubbardRing } from '../../support/model-hamiltonians';
import { allOccupations } from '../../support/operator-algebra';
import { randomOrbitalIntegrals, rotateOrbitals } from '../../support/random-orbital-integrals';

function denseEnergies(integrals: OrbitalIntegrals, electrons: number): Float64Array {
  const n = integrals.orbitalCount;
  const determinants = allOccupations(n, electrons, electrons, Number.POSITIVE_INFINITY).map(
    ({ alpha, beta }) => ({
      alpha: occupationString(n, alpha),
      beta: occupationString(n, beta),
    }),
  );
  const matrix = determinants.flatMap((left) =>
    determinants.map((right) => hamiltonianElement(left, right, integrals)),
  );
  return symmetricEigen(Float64Array.from(matrix), determinants.length).values;
}

/** A ring of sites over the orbitals that diagonalise the hopping: every state has a symmetry, and many mix. */
function ringInItsOrbitals(repulsion: number): OrbitalIntegrals {
  const ring = hubbardRing(6, repulsion);
  return rotateOrbitals(ring, symmetricEigen(ring.oneElectron, 6).vectors);
}

describe('findLowestStates', () => {
  it.each([
    [
      'eight species, weakly coupled',
      () => randomOrbitalIntegrals(6, 51, { coupling: 0.05, species: [0, 1, 2, 3, 4, 5] }),
    ],
    [
      'eight species, strongly coupled',
      () => randomOrbitalIntegrals(6, 52, { coupling: 0.3, species: [0, 4, 1, 2, 5, 6] }),
    ],
    ['four species', () => randomOrbitalIntegrals(6, 53, { coupling: 0.2, species: [0, 1, 2, 3, 0, 1] })],
    ['ring of sites, weak repulsion', () => ringInItsOrbitals(1)],
    ['ring of sites, medium repulsion', () => ringInItsOrbitals(4)],
  ])('independent: no root of any symmetry or spin is missed: %s', (_, build) => {
    const integrals = build();
    const exact = denseEnergies(integrals, 3);
    for (const states of [1, 2, 3, 4, 6, 10]) {
      const result = solveConfigurationInteraction(integrals, {
        alphaElectrons: 3,
        betaElectrons: 3,
        maximumRank: Number.POSITIVE_INFINITY,
        states,
      });
      expect(result.termination).toEqual({ kind: 'converged' });
      expect(result.iterations).toBeGreaterThan(0);
      result.states.forEach((state, k) => {
        expect(Math.abs(state.energy - exact[k])).toBeLessThan(1e-10);
        expect(state.spin).not.toBe('mixed');
      });
    }
  });
});
