import { describe, expect, it } from 'vitest';
import { congruence, multiplyLeftTransposed } from '../../../engine/linear-algebra/dense';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { randomSymmetric, seededRandom } from '../../support/random';

describe('symmetricEigen', () => {
  it.each([1, 2, 7, 30])('identity: VᵀAV is diagonal with rising values and VᵀV = 1, n = %i', (n) => {
    const matrix = randomSymmetric(n, seededRandom(n));
    const { values, vectors } = symmetricEigen(matrix, n);
    const diagonal = congruence(matrix, vectors, n, n);
    const metric = multiplyLeftTransposed(vectors, vectors, n, n, n);
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        expect(Math.abs(diagonal[i * n + j] - (i === j ? values[i] : 0))).toBeLessThan(1e-12);
        expect(Math.abs(metric[i * n + j] - (i === j ? 1 : 0))).toBeLessThan(1e-12);
      }
      if (i > 0) expect(values[i]).toBeGreaterThanOrEqual(values[i - 1]);
    }
  });

  it('identity: the second-difference matrix has the eigenvalues 2 − 2cos(kπ/(n+1))', () => {
    const n = 12;
    const matrix = new Float64Array(n * n);
    for (let i = 0; i < n; i++) {
      matrix[i * n + i] = 2;
      if (i > 0) {
        matrix[i * n + i - 1] = -1;
        matrix[(i - 1) * n + i] = -1;
      }
    }
    symmetricEigen(matrix, n).values.forEach((value, k) => {
      expect(Math.abs(value - (2 - 2 * Math.cos(((k + 1) * Math.PI) / (n + 1))))).toBeLessThan(1e-13);
    });
  });

  it('identity: a matrix with NaN is refused at once instead of iterating for ever', () => {
    expect(() => symmetricEigen(Float64Array.of(1, Number.NaN, Number.NaN, 1), 2)).toThrow(RangeError);
  });
});
