import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { occupiedOrbitals } from '../../../engine/configuration-interaction/determinants';
import { applySpinSquared, spinName } from '../../../engine/configuration-interaction/spin';
import { bruteSpinSquared } from '../../support/operator-algebra';
import { randomArray, seededRandom } from '../../support/random';

describe('applySpinSquared', () => {
  it.each([
    [4, 2, 2, Number.POSITIVE_INFINITY],
    [5, 2, 2, 2],
    [6, 3, 3, 2],
    [4, 1, 1, 2],
    [5, 3, 2, 2],
    [5, 3, 1, 3],
    [4, 1, 3, Number.POSITIVE_INFINITY],
    [4, 3, 0, 2],
  ])('identity: %i orbitals, %i + %i electrons, rank %d: equals operator algebra', (n, alpha, beta, rank) => {
    const space = buildDeterminantSpace(n, alpha, beta, rank);
    const vector = randomArray(space.dimension, seededRandom(n));
    const product = new Float64Array(space.dimension);
    applySpinSquared(space, vector, product);
    const determinants = Array.from({ length: space.dimension }, (_, place) => {
      const determinant = determinantAt(space, place);
      return { alpha: occupiedOrbitals(determinant.alpha), beta: occupiedOrbitals(determinant.beta) };
    });
    determinants.forEach((left, i) => {
      const expected = determinants.reduce(
        (sum, right, j) => sum + bruteSpinSquared(left, right, n) * vector[j],
        0,
      );
      expect(product[i]).toBeCloseTo(expected, 12);
    });
  });
});

describe('spinName', () => {
  it('identity: names S by S(S + 1) within the tolerance, else mixed', () => {
    expect([0, 0.75, 2, 3.75, 6, 8.75, 12].map(spinName)).toEqual([
      'singlet',
      'doublet',
      'triplet',
      'quartet',
      'quintet',
      'sextet',
      'septet',
    ]);
    expect([-1e-12, 2.0009, 1.9991].map(spinName)).toEqual(['singlet', 'triplet', 'triplet']);
    expect([1, 0.76, 0.002, 2.002].map(spinName)).toEqual(['mixed', 'mixed', 'mixed', 'mixed']);
  });
});
