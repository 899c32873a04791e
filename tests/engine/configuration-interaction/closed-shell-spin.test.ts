import { describe, expect, it } from 'vitest';
import {
  applyClosedShellSpinSquared,
  isClosedShellSpace,
} from '../../../engine/configuration-interaction/closed-shell-spin';
import { buildDeterminantSpace } from '../../../engine/configuration-interaction/determinant-space';
import { dot } from '../../../engine/linear-algebra/dense';
import { randomArray, seededRandom } from '../../support/random';

describe('applyClosedShellSpinSquared', () => {
  const space = buildDeterminantSpace(8, 3, 3, 2);
  const apply = (vector: Float64Array) => {
    const product = new Float64Array(vector.length).fill(Number.NaN);
    applyClosedShellSpinSquared(space, vector, product);
    return product;
  };

  it('identity: has the eigenvalues of singlets, triplets and quintets, and no others', () => {
    expect(isClosedShellSpace(space)).toBe(true);
    let vector = randomArray(space.dimension, seededRandom(1));
    for (const eigenvalue of [0, 2]) vector = apply(vector).map((value, i) => value - eigenvalue * vector[i]);
    expect(dot(vector, vector)).toBeGreaterThan(1);
    const rest = apply(vector).map((value, i) => value - 6 * vector[i]);
    expect(Math.sqrt(dot(rest, rest))).toBeLessThan(1e-12 * Math.sqrt(dot(vector, vector)));
  });

  it('identity: is symmetric', () => {
    const [left, right] = [2, 3].map((seed) => randomArray(space.dimension, seededRandom(seed)));
    expect(dot(left, apply(right))).toBeCloseTo(dot(apply(left), right), 10);
  });

  it('identity: leaves open shells and higher excitations to lists', () => {
    expect(isClosedShellSpace(buildDeterminantSpace(6, 3, 2, 2))).toBe(false);
    expect(isClosedShellSpace(buildDeterminantSpace(6, 3, 3, 3))).toBe(false);
  });
});
