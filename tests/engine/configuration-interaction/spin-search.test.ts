import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import {
  projectOnSpin,
  type SpinOperator,
  searchSpin,
} from '../../../engine/configuration-interaction/spin-search';
import { randomArray, seededRandom } from '../../support/random';

const HALF = 60;
const SPINS = [0, 2];

/** Two blocks, one of each “spin”, of random symmetric matrices with a rising diagonal. */
function blocks() {
  const random = seededRandom(11);
  return SPINS.map((_, block) => {
    const matrix = Matrix.zeros(HALF, HALF);
    for (let i = 0; i < HALF; i++) {
      for (let j = 0; j <= i; j++) {
        const value = (i === j ? 0.1 * i + block : 0) + 0.05 * (2 * random() - 1);
        matrix.set(i, j, value);
        matrix.set(j, i, value);
      }
    }
    return matrix;
  });
}

const spin: SpinOperator = {
  values: SPINS,
  apply: (vector, product) => {
    vector.forEach((element, i) => {
      product[i] = SPINS[i < HALF ? 0 : 1] * element;
    });
  },
};

describe('searchSpin', () => {
  const matrices = blocks();
  const problem = {
    apply: (vector: Float64Array, product: Float64Array) => {
      matrices.forEach((matrix, block) => {
        const part = Matrix.columnVector(Array.from(vector.subarray(block * HALF, (block + 1) * HALF)));
        product.set(matrix.mmul(part).to1DArray(), block * HALF);
      });
    },
  };
  const start = randomArray(2 * HALF, seededRandom(12));

  it.each([0, 1])('independent: brackets the lowest eigenvalue of block %i', (block) => {
    const values = new EigenvalueDecomposition(matrices[block]).realEigenvalues.sort((a, b) => a - b);
    const search = searchSpin(problem, spin, start, SPINS[block], 3);
    expect(search.lowerBound).toBeLessThanOrEqual(values[0]);
    search.values.forEach((value, k) => {
      expect(value).toBeGreaterThanOrEqual(values[k] - 1e-12);
    });
    expect(search.values[0] - values[0]).toBeLessThan(0.03);
    for (const vector of search.vectors) {
      const other = vector.subarray((1 - block) * HALF, (2 - block) * HALF);
      expect(Math.hypot(...other)).toBeLessThan(1e-12);
    }
  });

  it('identity: has nothing to find where the start has nothing of the spin', () => {
    const ofFirst = start.slice();
    projectOnSpin(spin, ofFirst, 0);
    const search = searchSpin(problem, spin, ofFirst, 2, 1);
    expect(search.vectors).toHaveLength(0);
    expect(search.lowerBound).toBe(Number.POSITIVE_INFINITY);
  });
});
