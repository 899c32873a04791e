import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { occupiedOrbitals } from '../../../engine/configuration-interaction/determinants';
import { doublesDensity } from '../../../engine/configuration-interaction/doubles-density';
import { bruteOneElectron } from '../../support/operator-algebra';
import { randomArray, seededRandom } from '../../support/random';

describe('doublesDensity', () => {
  it.each([
    [5, 2, 2],
    [5, 1, 3],
    [4, 1, 1],
  ])(
    'identity: %i orbitals, %i + %i electrons: between two vectors, equals operator algebra',
    (n, alpha, beta) => {
      const space = buildDeterminantSpace(n, alpha, beta, 2);
      const [left, right] = [1, 2].map((seed) => randomArray(space.dimension, seededRandom(seed)));
      const density = doublesDensity(space.beta, space.alpha, space.rows, left, right);
      const determinants = Array.from(left, (_, place) => {
        const determinant = determinantAt(space, place);
        return { alpha: occupiedOrbitals(determinant.alpha), beta: occupiedOrbitals(determinant.beta) };
      });
      const nothing = new Float64Array(n * n);
      for (let p = 0; p < n; p++) {
        for (let q = 0; q <= p; q++) {
          const operator = new Float64Array(n * n);
          operator[p * n + q] += 0.5;
          operator[q * n + p] += 0.5;
          let expected = 0;
          determinants.forEach((bra, i) => {
            determinants.forEach((ket, j) => {
              expected += left[i] * right[j] * bruteOneElectron(bra, ket, nothing, n, operator);
            });
          });
          expect(density[p * n + q]).toBeCloseTo(expected, 11);
          expect(density[q * n + p]).toBe(density[p * n + q]);
        }
      }
    },
  );
});
