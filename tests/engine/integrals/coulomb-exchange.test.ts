import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { coulombExchangeInto } from '../../../engine/integrals/coulomb-exchange';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import { inForm, relativeDifference } from '../../support/kernel-forms';
import { randomArray, randomSymmetric, seededRandom } from '../../support/random';
import { randomMeanFieldProblem } from '../../support/random-mean-field';

describe('coulombExchangeInto', () => {
  it.each([1, 2, 5, 9])('identity: equals the plain fourfold sums, n = %i', (n) => {
    const { repulsion } = randomMeanFieldProblem(n, 3);
    const density = randomSymmetric(n, seededRandom(n));
    const coulomb = new Float64Array(n * n);
    const exchange = new Float64Array(n * n);
    coulombExchangeInto(density, repulsion, n, coulomb, exchange);
    const integral = (i: number, j: number, k: number, l: number) =>
      repulsion[packedPair(packedPair(i, j), packedPair(k, l))];
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        let expectedCoulomb = 0;
        let expectedExchange = 0;
        for (let k = 0; k < n; k++) {
          for (let l = 0; l < n; l++) {
            expectedCoulomb += integral(i, j, k, l) * density[k * n + l];
            expectedExchange += integral(i, k, j, l) * density[k * n + l];
          }
        }
        expect(Math.abs(coulomb[i * n + j] - expectedCoulomb)).toBeLessThan(1e-13);
        expect(Math.abs(exchange[i * n + j] - expectedExchange)).toBeLessThan(1e-13);
      }
    }
  });

  it('independent: the fast form gives what the plain one does', () => {
    fc.assert(
      fc.property(fc.integer({ min: 8, max: 30 }), fc.integer(), (n, seed) => {
        const random = seededRandom(seed);
        const pairs = (n * (n + 1)) / 2;
        const repulsion = randomArray((pairs * (pairs + 1)) / 2, random);
        const density = randomSymmetric(n, random);
        const [fast, plain] = (['fast', 'plain'] as const).map((form) => {
          const coulomb = new Float64Array(n * n);
          const exchange = new Float64Array(n * n);
          inForm(form, () => coulombExchangeInto(density, repulsion, n, coulomb, exchange));
          return { coulomb, exchange };
        });
        expect(relativeDifference(fast.coulomb, plain.coulomb)).toBeLessThan(1e-12);
        expect(relativeDifference(fast.exchange, plain.exchange)).toBeLessThan(1e-12);
      }),
      { seed: 10, numRuns: 30 },
    );
  });
});
