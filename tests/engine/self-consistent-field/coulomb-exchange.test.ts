import { describe, expect, it } from 'vitest';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import { coulombExchangeInto } from '../../../engine/self-consistent-field/coulomb-exchange';
import { randomSymmetric, seededRandom } from '../../support/random';
import { randomMeanFieldProblem } from '../../support/random-mean-field';

describe('coulombExchangeInto', () => {
  it.each([1, 2, 5])('identity: equals the plain fourfold sums, n = %i', (n) => {
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
});
