import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { occupiedOrbitals } from '../../../engine/configuration-interaction/determinants';
import {
  naturalOrbitals,
  oneParticleDensity,
} from '../../../engine/configuration-interaction/one-particle-density';
import { congruence, dot } from '../../../engine/linear-algebra/dense';
import { bruteOneElectron } from '../../support/operator-algebra';
import { randomArray, seededRandom } from '../../support/random';

const CASES = [
  [4, 2, 2, Number.POSITIVE_INFINITY],
  [5, 2, 2, 2],
  [5, 3, 2, 2],
  [5, 1, 3, 3],
] as const;

function randomState(n: number, alpha: number, beta: number, rank: number) {
  const space = buildDeterminantSpace(n, alpha, beta, rank);
  const vector = randomArray(space.dimension, seededRandom(n + alpha));
  const norm = Math.sqrt(dot(vector, vector));
  return { space, vector: vector.map((value) => value / norm) };
}

describe('oneParticleDensity', () => {
  it.each(CASES)(
    'identity: %i orbitals, %i + %i electrons, rank %d: equals operator algebra',
    (n, alpha, beta, rank) => {
      const { space, vector } = randomState(n, alpha, beta, rank);
      const density = oneParticleDensity(space, vector);
      const determinants = Array.from(vector, (_, place) => {
        const determinant = determinantAt(space, place);
        return { alpha: occupiedOrbitals(determinant.alpha), beta: occupiedOrbitals(determinant.beta) };
      });
      for (const pair of [0, 1, n + 3, 2 * n + 1, 3 * n, n * n - 1]) {
        const operator = new Float64Array(n * n);
        operator[pair] = 1;
        let expected = 0;
        determinants.forEach((left, i) => {
          determinants.forEach((right, j) => {
            expected += vector[i] * vector[j] * bruteOneElectron(left, right, operator, n);
          });
        });
        expect(density[pair]).toBeCloseTo(expected, 12);
      }
    },
  );

  it.each(CASES)(
    'identity: %i orbitals, %i + %i electrons, rank %d: trace, symmetry, natural occupations from 2 to 0',
    (n, alpha, beta, rank) => {
      const { space, vector } = randomState(n, alpha, beta, rank);
      const density = oneParticleDensity(space, vector);
      const { values, vectors } = naturalOrbitals(density, n);
      let trace = 0;
      for (let p = 0; p < n; p++) trace += density[p * n + p];
      expect(trace).toBeCloseTo(alpha + beta, 12);
      const diagonal = congruence(density, vectors, n, n);
      for (let p = 0; p < n; p++) {
        for (let q = 0; q < n; q++) {
          expect(density[p * n + q]).toBe(density[q * n + p]);
          expect(diagonal[p * n + q]).toBeCloseTo(p === q ? values[p] : 0, 12);
        }
        expect(values[p]).toBeGreaterThan(-1e-12);
        expect(values[p]).toBeLessThan(2 + 1e-12);
        if (p > 0) expect(values[p]).toBeLessThanOrEqual(values[p - 1]);
      }
    },
  );
});
