import { describe, expect, it } from 'vitest';
import {
  makeDegenerateStatesDefinite,
  splitRuns,
} from '../../../engine/configuration-interaction/degenerate-states';
import { dot } from '../../../engine/linear-algebra/dense';

const DIAGONAL = Float64Array.from([3, 1, 2, 2]);
const operator = (tolerance: number, diagonal: Float64Array) => ({
  tolerance,
  apply: (vector: Float64Array, product: Float64Array) =>
    product.set(vector.map((value, i) => diagonal[i] * value)),
});

describe('splitRuns', () => {
  it('identity: cuts where neighbours lie apart, never joins', () => {
    const values = [1, 1.05, 1.1, 2, 2.05];
    expect(splitRuns([{ first: 0, last: 5 }], values, 0.06)).toEqual([
      { first: 0, last: 3 },
      { first: 3, last: 5 },
    ]);
    expect(splitRuns([{ first: 1, last: 2 }], values, 10)).toEqual([{ first: 1, last: 2 }]);
  });
});

describe('makeDegenerateStatesDefinite', () => {
  it('identity: a mixed pair becomes eigenvectors of the operator, others stay', () => {
    const { sin, cos } = Math;
    const vectors = [
      Float64Array.from([cos(0.4), sin(0.4), 0, 0]),
      Float64Array.from([-sin(0.4), cos(0.4), 0, 0]),
      Float64Array.from([0, 0, 1, 0]),
    ];
    const energies = Float64Array.from([-1, -1, 0.5]);
    makeDegenerateStatesDefinite(energies, vectors, 1e-6, [operator(0, DIAGONAL)]);
    expect(Math.abs(vectors[0][1])).toBeCloseTo(1, 14);
    expect(Math.abs(vectors[1][0])).toBeCloseTo(1, 14);
    expect(vectors[2]).toEqual(Float64Array.from([0, 0, 1, 0]));
    [-1, -1, 0.5].forEach((energy, k) => {
      expect(energies[k]).toBeCloseTo(energy, 14);
    });
  });

  it('identity: a second operator tells apart what the first leaves equal', () => {
    const half = Math.SQRT1_2;
    const vectors = [Float64Array.from([0, 0, half, half]), Float64Array.from([0, 0, half, -half])];
    const second = Float64Array.from([0, 0, 5, 4]);
    makeDegenerateStatesDefinite(new Float64Array(2), vectors, 1e-6, [
      operator(1e-3, DIAGONAL),
      operator(0, second),
    ]);
    expect(Math.abs(vectors[0][3])).toBeCloseTo(1, 14);
    expect(Math.abs(dot(vectors[0], vectors[1]))).toBeLessThan(1e-15);
  });

  it('identity: energies of rotated states are expectation values', () => {
    const half = Math.SQRT1_2;
    const vectors = [Float64Array.from([half, half, 0, 0]), Float64Array.from([half, -half, 0, 0])];
    const energies = Float64Array.from([1, 1 + 4e-7]);
    makeDegenerateStatesDefinite(energies, vectors, 1e-6, [operator(0, DIAGONAL)]);
    expect(energies[0]).toBeCloseTo(1 + 2e-7, 12);
    expect(energies[1]).toBeCloseTo(1 + 2e-7, 12);
  });
});
