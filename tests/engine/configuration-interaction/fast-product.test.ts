import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildDeterminantSpace } from '../../../engine/configuration-interaction/determinant-space';
import {
  prepareFastProduct,
  prepareFullProduct,
} from '../../../engine/configuration-interaction/fast-product';
import { buildSectors } from '../../../engine/configuration-interaction/sector';
import type { OrbitalIntegrals } from '../../../engine/integrals/orbital-integrals';
import { scratchMemory } from '../../../engine/kernels/kernel-memory';
import { productDeviation } from '../../support/product-deviation';
import { randomArray, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals, randomUnrestrictedIntegrals } from '../../support/random-orbital-integrals';

const fullProduct: typeof prepareFastProduct = ([sector], integrals, _irreps, memory) =>
  prepareFullProduct(sector, integrals, memory);

const sizes = fc.integer({ min: 1, max: 7 }).chain((n) =>
  fc.record({
    n: fc.constant(n),
    alpha: fc.integer({ min: 0, max: n }),
    beta: fc.integer({ min: 0, max: n }),
    rank: fc.constantFrom(1, 2, 3, 4, Number.POSITIVE_INFINITY),
    species: fc.array(fc.integer({ min: 0, max: 7 }), { minLength: n, maxLength: n }),
    seed: fc.nat(10_000),
    parity: fc.constantFrom(0, 1, -1),
  }),
);

describe('prepareFastProduct', () => {
  it('independent: equals the plain product in every sector, for any electron counts, ranks and symmetries', () => {
    fc.assert(
      fc.property(sizes, ({ n, alpha, beta, rank, species, seed, parity }) => {
        const integrals = randomOrbitalIntegrals(n, seed, { species });
        const kept = alpha === beta ? parity : 0;
        expect(
          productDeviation(integrals, [alpha, beta, rank], species, kept, prepareFastProduct),
        ).toBeLessThan(1e-11);
      }),
      { seed: 11, numRuns: 150 },
    );
  });

  it('independent: equals the plain product without symmetry, also over beta orbitals of their own', () => {
    fc.assert(
      fc.property(sizes, ({ n, alpha, beta, rank, seed, parity }) => {
        const kept = alpha === beta ? parity : 0;
        expect(
          productDeviation(
            randomOrbitalIntegrals(n, seed),
            [alpha, beta, rank],
            undefined,
            kept,
            prepareFastProduct,
          ),
        ).toBeLessThan(1e-11);
        expect(
          productDeviation(
            randomUnrestrictedIntegrals(n, seed),
            [alpha, beta, rank],
            undefined,
            0,
            prepareFastProduct,
          ),
        ).toBeLessThan(1e-11);
      }),
      { seed: 12, numRuns: 80 },
    );
  });

  it('independent: equals the plain product where tasks hold more strings than one stretch, block or representation', () => {
    for (const parity of [0, 1, -1]) {
      const species = [0, 1, 2, 3, 0, 0, 1, 2, 3];
      const integrals = randomOrbitalIntegrals(9, 5, { species });
      expect(
        productDeviation(integrals, [4, 4, Number.POSITIVE_INFINITY], species, parity, prepareFastProduct),
      ).toBeLessThan(1e-11);
      expect(productDeviation(integrals, [4, 4, 4], species, parity, prepareFastProduct)).toBeLessThan(1e-11);
    }
  });
});

describe('prepareFullProduct', () => {
  it('independent: equals the plain product for any electron counts, also over beta orbitals of their own', () => {
    fc.assert(
      fc.property(sizes, ({ n, alpha, beta, seed, parity }) => {
        const of = (integrals: OrbitalIntegrals, kept: number) =>
          productDeviation(integrals, [alpha, beta, Number.POSITIVE_INFINITY], undefined, kept, fullProduct);
        expect(of(randomOrbitalIntegrals(n, seed), alpha === beta ? parity : 0)).toBeLessThan(1e-11);
        expect(of(randomUnrestrictedIntegrals(n, seed), 0)).toBeLessThan(1e-11);
      }),
      { seed: 13, numRuns: 100 },
    );
  });

  it.each([
    [10, 4, 4],
    [9, 2, 5],
    [11, 6, 2],
    // strings in two words
    [34, 2, 0],
    [34, 1, 1],
  ])(
    'independent: equals the plain product, %i orbitals, %i + %i electrons: several tasks and stretches',
    (n, alpha, beta) => {
      const integrals = randomOrbitalIntegrals(n, 6);
      for (const parity of alpha === beta ? [0, 1, -1] : [0]) {
        const size = [alpha, beta, Number.POSITIVE_INFINITY] as const;
        expect(productDeviation(integrals, size, undefined, parity, fullProduct)).toBeLessThan(1e-11);
      }
    },
  );

  it('identity: vectors that stand in the memory of the kernels are worked on there, with the same result', () => {
    const space = buildDeterminantSpace(8, 3, 3, Number.POSITIVE_INFINITY);
    const [sector] = buildSectors(space, undefined);
    const memory = scratchMemory();
    memory.scope(() => {
      const apply = prepareFullProduct(sector, randomOrbitalIntegrals(8, 4), memory);
      const vector = randomArray(sector.dimension, seededRandom(5));
      const expected = new Float64Array(sector.dimension);
      apply(sector, vector, expected, 0);
      const [placed, product] = [
        memory.float64(sector.dimension).view,
        memory.float64(sector.dimension).view,
      ];
      placed.set(vector);
      apply(sector, placed, product, 0);
      expect(product).toEqual(expected);
      expect(placed).toEqual(vector);
    });
  });
});
