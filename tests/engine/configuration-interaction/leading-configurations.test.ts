import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  type DeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { isOccupied } from '../../../engine/configuration-interaction/determinants';
import { leadingConfigurations } from '../../../engine/configuration-interaction/leading-configurations';
import { dot } from '../../../engine/linear-algebra/dense';
import { randomArray, seededRandom } from '../../support/random';

/** Weights by occupation numbers such as 2110, every determinant looked at. */
function allWeights(space: DeterminantSpace, vector: Float64Array): Map<string, number> {
  const weights = new Map<string, number>();
  vector.forEach((coefficient, place) => {
    const { alpha, beta } = determinantAt(space, place);
    let key = '';
    for (let p = 0; p < space.orbitalCount; p++) {
      key += Number(isOccupied(alpha, p)) + Number(isOccupied(beta, p));
    }
    weights.set(key, (weights.get(key) ?? 0) + coefficient ** 2);
  });
  return weights;
}

/** Weights that fall off fast, so that some are on either side of every limit. */
function fallingState(space: DeterminantSpace): Float64Array {
  const vector = randomArray(space.dimension, seededRandom(5)).map((value, i) => value / (1 + i));
  const norm = Math.sqrt(dot(vector, vector));
  return vector.map((value) => value / norm);
}

describe('leadingConfigurations', () => {
  it.each([
    [6, 3, 3, Number.POSITIVE_INFINITY],
    [6, 3, 3, 2],
    [6, 4, 2, 3],
    [5, 1, 0, 1],
    // second word of the bit strings
    [34, 1, 1, 2],
  ])(
    'identity: %i orbitals, %i + %i electrons, rank %d: sums over all determinants',
    (n, alpha, beta, rank) => {
      const space = buildDeterminantSpace(n, alpha, beta, rank);
      const vector = fallingState(space);
      const expected = [...allWeights(space, vector)]
        .filter(([, weight]) => weight > 1e-3)
        .sort((a, b) => b[1] - a[1])
        .slice(0, 8);
      const found = leadingConfigurations(space, vector);
      expect(found).toHaveLength(expected.length);
      found.forEach(({ weight, doublyOccupied, singlyOccupied }, k) => {
        const occupations = Array<number>(n).fill(0);
        for (const p of doublyOccupied) occupations[p] = 2;
        for (const p of singlyOccupied) occupations[p] = 1;
        expect(occupations.join('')).toBe(expected[k]![0]);
        expect(weight).toBeCloseTo(expected[k]![1], 14);
      });
    },
  );
});
