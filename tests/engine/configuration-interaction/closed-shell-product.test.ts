import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { prepareClosedShellProduct } from '../../../engine/configuration-interaction/closed-shell-product';
import { productDeviation } from '../../support/product-deviation';
import { randomOrbitalIntegrals } from '../../support/random-orbital-integrals';

/** Of `pairs` electrons of each spin in n orbitals, up to double excitations. */
function deviation(
  { n, pairs, seed }: { n: number; pairs: number; seed: number },
  species: readonly number[] | undefined,
  parity: number,
): number {
  const integrals = randomOrbitalIntegrals(n, seed, { species: species ?? [] });
  return productDeviation(integrals, [pairs, pairs, 2], species, parity, prepareClosedShellProduct);
}

const sizes = fc.integer({ min: 2, max: 8 }).chain((n) =>
  fc.record({
    n: fc.constant(n),
    pairs: fc.integer({ min: 1, max: n - 1 }),
    species: fc.array(fc.integer({ min: 0, max: 7 }), { minLength: n, maxLength: n }),
    seed: fc.nat(10_000),
    parity: fc.constantFrom(0, 1, -1),
  }),
);

describe('prepareClosedShellProduct', () => {
  it('independent: equals the plain product over determinants in every sector, for any electron count and symmetry', () => {
    fc.assert(
      fc.property(sizes, ({ species, parity, ...size }) => {
        expect(deviation(size, species, parity)).toBeLessThan(1e-11);
      }),
      { seed: 21, numRuns: 150 },
    );
  });

  it('independent: equals the plain product without symmetry', () => {
    fc.assert(
      fc.property(sizes, ({ parity, ...size }) => {
        expect(deviation(size, undefined, parity)).toBeLessThan(1e-11);
      }),
      { seed: 22, numRuns: 100 },
    );
  });

  it('independent: equals the plain product where matrices are wider than a tile of the kernels', () => {
    for (const parity of [1, -1]) {
      expect(deviation({ n: 14, pairs: 5, seed: 3 }, undefined, parity)).toBeLessThan(1e-11);
      const species = [0, 1, 2, 0, 3, 0, 1, 2, 3, 0, 0, 2, 3, 1];
      expect(deviation({ n: 14, pairs: 5, seed: 4 }, species, parity)).toBeLessThan(1e-11);
    }
  });
});
