import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { prepareClosedShellProduct } from '../../../engine/configuration-interaction/closed-shell-product';
import { buildDeterminantSpace } from '../../../engine/configuration-interaction/determinant-space';
import { preparePlainProduct } from '../../../engine/configuration-interaction/plain-product';
import { buildSectors, putSector, takeSector } from '../../../engine/configuration-interaction/sector';
import { makeEvenOrOdd } from '../../../engine/configuration-interaction/spin-flip';
import { scratchMemory } from '../../../engine/kernels/kernel-memory';
import { randomArray, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals } from '../../support/random-orbital-integrals';

/** Largest deviation from the plain product over all sectors, relative to the largest element. */
function deviation(
  { n, pairs, seed }: { n: number; pairs: number; seed: number },
  species: readonly number[] | undefined,
  parity: number,
): number {
  const integrals = randomOrbitalIntegrals(n, seed, { species: species ?? [] });
  const space = buildDeterminantSpace(n, pairs, pairs, 2);
  const sectors = buildSectors(space, species);
  const plain = preparePlainProduct(space, integrals);
  const memory = scratchMemory();
  return memory.scope(() => {
    const dense = prepareClosedShellProduct(sectors, integrals, species, memory);
    let largest = 0;
    let scale = 0;
    for (const sector of sectors) {
      const vector = randomArray(sector.dimension, seededRandom(sector.irrep + 1));
      if (parity !== 0) makeEvenOrOdd(sector, vector, parity);
      const product = new Float64Array(sector.dimension).fill(Number.NaN);
      dense(sector, vector, product, parity);
      const whole = new Float64Array(space.dimension);
      putSector(sector, vector, whole);
      const ofWhole = new Float64Array(space.dimension);
      plain(whole, ofWhole, 0);
      takeSector(sector, ofWhole).forEach((value, i) => {
        // not a number must not pass
        if (!(Math.abs(product[i] - value) <= largest)) largest = Math.abs(product[i] - value);
        scale = Math.max(scale, Math.abs(value));
      });
    }
    return scale === 0 ? largest : largest / scale;
  });
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
