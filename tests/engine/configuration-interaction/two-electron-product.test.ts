import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { buildDeterminantSpace } from '../../../engine/configuration-interaction/determinant-space';
import { preparePlainProduct } from '../../../engine/configuration-interaction/plain-product';
import { buildSectors, putSector, takeSector } from '../../../engine/configuration-interaction/sector';
import { makeEvenOrOdd } from '../../../engine/configuration-interaction/spin-flip';
import {
  isTwoElectronSpace,
  prepareTwoElectronProduct,
} from '../../../engine/configuration-interaction/two-electron-product';
import { inForm, relativeDifference } from '../../support/kernel-forms';
import { randomArray, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals, randomUnrestrictedIntegrals } from '../../support/random-orbital-integrals';

describe('prepareTwoElectronProduct', () => {
  it('independent: equals the product by lists in every representation and for any parity', () => {
    const cases = fc.integer({ min: 2, max: 16 }).chain((n) =>
      fc.record({
        n: fc.constant(n),
        species: fc.array(fc.integer({ min: 0, max: 3 }), { minLength: n, maxLength: n }),
        seed: fc.nat(10_000),
        parity: fc.constantFrom(0, 1, -1),
        form: fc.constantFrom('fast' as const, 'plain' as const),
      }),
    );
    fc.assert(
      fc.property(cases, ({ n, species, seed, parity, form }) => {
        const integrals = randomOrbitalIntegrals(n, seed, { species });
        const space = buildDeterminantSpace(n, 1, 1, 2);
        expect(isTwoElectronSpace(space, integrals)).toBe(true);
        const plain = preparePlainProduct(space, integrals);
        for (const sector of buildSectors(space, species)) {
          const vector = randomArray(sector.dimension, seededRandom(seed));
          if (parity !== 0) makeEvenOrOdd(sector, vector, parity);
          const product = new Float64Array(sector.dimension).fill(Number.NaN);
          inForm(form, () => prepareTwoElectronProduct(space, integrals)(sector, vector, product, parity));
          const whole = new Float64Array(space.dimension);
          putSector(sector, vector, whole);
          const ofWhole = new Float64Array(space.dimension);
          plain(whole, ofWhole, 0);
          const expected = takeSector(sector, ofWhole);
          // an odd vector of one determinant is zero
          if (expected.some((value) => value !== 0)) {
            expect(relativeDifference(product, expected)).toBeLessThan(1e-11);
          } else {
            expect(Math.max(...product.map(Math.abs))).toBe(0);
          }
        }
      }),
      { seed: 14, numRuns: 60 },
    );
  });

  it('identity: is not taken for other electrons, ranks or orbitals of their own', () => {
    const integrals = randomOrbitalIntegrals(4, 1);
    expect(isTwoElectronSpace(buildDeterminantSpace(4, 2, 1, Number.POSITIVE_INFINITY), integrals)).toBe(
      false,
    );
    expect(isTwoElectronSpace(buildDeterminantSpace(4, 2, 0, Number.POSITIVE_INFINITY), integrals)).toBe(
      false,
    );
    expect(isTwoElectronSpace(buildDeterminantSpace(4, 1, 1, 1), integrals)).toBe(false);
    const ofTheirOwn = randomUnrestrictedIntegrals(4, 1);
    expect(isTwoElectronSpace(buildDeterminantSpace(4, 1, 1, 2), ofTheirOwn)).toBe(false);
  });
});
