import { describe, expect, it } from 'vitest';
import { occupationString } from '../../../engine/configuration-interaction/determinants';
import { hamiltonianElement } from '../../../engine/configuration-interaction/matrix-elements';
import { solveConfigurationInteraction } from '../../../engine/configuration-interaction/solve';
import type { OrbitalIntegrals } from '../../../engine/integrals/orbital-integrals';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { allOccupations, bruteHamiltonian, operatorMatrix } from '../../support/operator-algebra';
import { randomOrbitalIntegrals } from '../../support/random-orbital-integrals';

const FULL = Number.POSITIVE_INFINITY;

/** The whole spectrum from the dense matrix of Slater–Condon elements. */
function spectrum(integrals: OrbitalIntegrals, alpha: number, beta: number, rank: number): Float64Array {
  const n = integrals.orbitalCount;
  const determinants = allOccupations(n, alpha, beta, rank).map((occupied) => ({
    alpha: occupationString(n, occupied.alpha),
    beta: occupationString(n, occupied.beta),
  }));
  const matrix = Float64Array.from(
    determinants.flatMap((left) => determinants.map((right) => hamiltonianElement(left, right, integrals))),
  );
  return symmetricEigen(matrix, determinants.length).values;
}

describe('solveConfigurationInteraction', () => {
  it.each([
    [7, 3, 3, FULL, 10, 1],
    [7, 3, 3, FULL, 1, 2],
    [7, 4, 2, FULL, 5, 3],
    [10, 4, 4, 2, 6, 4],
    [9, 4, 3, 2, 4, 5],
    [8, 3, 2, 3, 7, 6],
  ])(
    'independent: %i orbitals, %i + %i electrons, rank %d: the lowest %i states of the dense matrix',
    (n, a, b, rank, states, seed) => {
      const species = seed % 2 === 0 ? [] : [0, 1, 2, 3, 0, 1, 2, 3, 0];
      const integrals = randomOrbitalIntegrals(n, seed, { species, coupling: 0.15 });
      const result = solveConfigurationInteraction(integrals, {
        alphaElectrons: a,
        betaElectrons: b,
        maximumRank: rank,
        states,
      });
      const exact = spectrum(integrals, a, b, rank);
      expect(result.determinants).toBe(exact.length);
      expect(result.iterations).toBeGreaterThan(0);
      expect(result.termination).toEqual({ kind: 'converged' });
      expect(result.states).toHaveLength(states);
      result.states.forEach((state, k) => {
        expect(Math.abs(state.energy - exact[k])).toBeLessThan(1e-9);
        expect(state.residual).toBeLessThan(1e-6);
      });
    },
  );
});
