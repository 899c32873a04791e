import { describe, expect, it } from 'vitest';
import { buildDeterminantSpace } from '../../../engine/configuration-interaction/determinant-space';
import { prepareHamiltonianProduct } from '../../../engine/configuration-interaction/hamiltonian-product';
import { spinDensities, spinSummed } from '../../../engine/configuration-interaction/one-particle-density';
import { twoParticleDensity } from '../../../engine/configuration-interaction/two-particle-density';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import { dot } from '../../../engine/linear-algebra/dense';
import { randomArray, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals } from '../../support/random-orbital-integrals';

const CASES = [
  [4, 2, 2, Number.POSITIVE_INFINITY],
  [6, 3, 3, 2],
  [6, 3, 2, 3],
  [5, 1, 3, 2],
  [5, 4, 1, Number.POSITIVE_INFINITY],
  [6, 2, 0, 2],
] as const;

describe('twoParticleDensity', () => {
  it.each(CASES)(
    'identity: %i orbitals, %i + %i electrons, rank %d: ⟨H⟩ from densities is that of the product with H',
    (n, alpha, beta, rank) => {
      const space = buildDeterminantSpace(n, alpha, beta, rank);
      const raw = randomArray(space.dimension, seededRandom(n + alpha));
      const norm = Math.sqrt(dot(raw, raw));
      const vector = raw.map((value) => value / norm);
      const one = spinSummed(spinDensities(space, vector, vector));
      const two = twoParticleDensity(space, vector);
      // several Hamiltonians: every element of the density counts
      for (let seed = 1; seed <= 4; seed++) {
        const integrals = randomOrbitalIntegrals(n, seed);
        let energy = integrals.coreEnergy + dot(integrals.oneElectron, one);
        two.forEach((value, place) => {
          const pq = Math.trunc(place / (n * n));
          const rs = place % (n * n);
          const left = packedPair(Math.trunc(pq / n), pq % n);
          const right = packedPair(Math.trunc(rs / n), rs % n);
          energy += (integrals.twoElectron[packedPair(left, right)] * value) / 2;
        });
        const product = new Float64Array(space.dimension);
        prepareHamiltonianProduct(space, integrals).apply(vector, product);
        expect(Math.abs(energy - dot(vector, product))).toBeLessThan(1e-11);
      }
    },
  );

  it.each(CASES)(
    'identity: %i orbitals, %i + %i electrons, rank %d: Σ over r of Γ(pq, rr) = (N − 1)·γ(pq)',
    (n, alpha, beta, rank) => {
      const space = buildDeterminantSpace(n, alpha, beta, rank);
      const raw = randomArray(space.dimension, seededRandom(9));
      const norm = Math.sqrt(dot(raw, raw));
      const vector = raw.map((value) => value / norm);
      const one = spinSummed(spinDensities(space, vector, vector));
      const two = twoParticleDensity(space, vector);
      for (let pair = 0; pair < n * n; pair++) {
        let sum = 0;
        for (let r = 0; r < n; r++) sum += two[pair * n * n + r * n + r];
        expect(Math.abs(sum - (alpha + beta - 1) * one[pair])).toBeLessThan(1e-12);
      }
    },
  );
});
