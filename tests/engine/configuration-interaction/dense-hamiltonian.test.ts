import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  applyDense,
  buildDenseHamiltonians,
} from '../../../engine/configuration-interaction/dense-hamiltonian';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { hamiltonianElement } from '../../../engine/configuration-interaction/matrix-elements';
import { buildSectors, placesInSpace } from '../../../engine/configuration-interaction/sector';
import type { OrbitalIntegrals } from '../../../engine/integrals/orbital-integrals';
import { randomOrbitalIntegrals, randomUnrestrictedIntegrals } from '../../support/random-orbital-integrals';

/** Largest deviation of the matrices from the rules of Slater and Condon, hartree. */
function deviation(
  integrals: OrbitalIntegrals,
  [alpha, beta, rank]: readonly [number, number, number],
  species?: readonly number[],
): number {
  const space = buildDeterminantSpace(integrals.orbitalCount, alpha, beta, rank);
  const sectors = buildSectors(space, species);
  const matrices = buildDenseHamiltonians(space, sectors, integrals, species);
  let largest = 0;
  for (const sector of sectors) {
    const d = sector.dimension;
    const places = placesInSpace(
      sector,
      Int32Array.from({ length: d }, (_, place) => place),
    );
    const determinants = Array.from(places, (place) => determinantAt(space, place));
    matrices.get(sector)!.forEach((value, place) => {
      const [i, j] = [Math.floor(place / d), place % d];
      const expected =
        hamiltonianElement(determinants[i], determinants[j], integrals) -
        (i === j ? integrals.coreEnergy : 0);
      // not a number must not pass
      if (!(Math.abs(value - expected) <= largest)) largest = Math.abs(value - expected);
    });
  }
  return largest;
}

const sizes = fc.integer({ min: 1, max: 5 }).chain((n) =>
  fc.record({
    n: fc.constant(n),
    alpha: fc.integer({ min: 0, max: n }),
    beta: fc.integer({ min: 0, max: n }),
    rank: fc.constantFrom(1, 2, 3, Number.POSITIVE_INFINITY),
    species: fc.array(fc.integer({ min: 0, max: 7 }), { minLength: n, maxLength: n }),
    seed: fc.nat(10_000),
  }),
);

describe('buildDenseHamiltonians', () => {
  it('independent: holds the elements by the rules of Slater and Condon, in every sector', () => {
    fc.assert(
      fc.property(sizes, ({ n, alpha, beta, rank, species, seed }) => {
        const integrals = randomOrbitalIntegrals(n, seed, { species });
        expect(deviation(integrals, [alpha, beta, rank], species)).toBeLessThan(1e-12);
      }),
      { seed: 31, numRuns: 60 },
    );
  });

  it('independent: the same over beta orbitals of their own', () => {
    fc.assert(
      fc.property(sizes, ({ n, alpha, beta, rank, seed }) => {
        expect(deviation(randomUnrestrictedIntegrals(n, seed), [alpha, beta, rank])).toBeLessThan(1e-12);
      }),
      { seed: 32, numRuns: 40 },
    );
  });
});

describe('applyDense', () => {
  it('identity: gives a column of the matrix for each unit vector', () => {
    const product = new Float64Array(2);
    applyDense(Float64Array.of(1, 2, 3, 4), Float64Array.of(0, 1), product);
    expect(product).toEqual(Float64Array.of(2, 4));
  });
});
