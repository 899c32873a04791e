import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { smallSymmetricEigen } from '../../../engine/linear-algebra/small-eigen';

const element = fc.oneof(
  fc.constantFrom(0, 1, -1, 1e-160, -3e-8, 1e150, -1e150),
  fc.double({ min: -10, max: 10, noNaN: true }),
);

describe('smallSymmetricEigen', () => {
  it('identity: V diag(values) Vᵀ is the matrix, VᵀV = 1 and values rise, of any size of elements', () => {
    fc.assert(
      fc.property(element, element, element, (first, below, second) => {
        // what stands above the diagonal is not read
        const { values, vectors } = smallSymmetricEigen(Float64Array.of(first, Number.NaN, below, second), 2);
        const largest = Math.max(Math.abs(first), Math.abs(below), Math.abs(second), Number.MIN_VALUE);
        const [a, b, c, d] = vectors;
        // the smallest numbers have no digits to be right in
        const tolerance = 4e-16 * largest + 2 * Number.MIN_VALUE;
        expect(values[0]).toBeLessThanOrEqual(values[1]);
        expect(Math.abs(a * a * values[0] + b * b * values[1] - first)).toBeLessThanOrEqual(tolerance);
        expect(Math.abs(c * a * values[0] + d * b * values[1] - below)).toBeLessThanOrEqual(tolerance);
        expect(Math.abs(c * c * values[0] + d * d * values[1] - second)).toBeLessThanOrEqual(tolerance);
        expect(Math.abs(a * b + c * d)).toBeLessThan(4e-16);
        expect(Math.abs(a * a + c * c - 1)).toBeLessThan(4e-16);
        expect(Math.abs(b * b + d * d - 1)).toBeLessThan(4e-16);
      }),
      { seed: 2, numRuns: 500 },
    );
  });

  it('identity: one row, and none', () => {
    expect(smallSymmetricEigen(Float64Array.of(-3), 1)).toEqual({
      values: Float64Array.of(-3),
      vectors: Float64Array.of(1),
    });
    expect(smallSymmetricEigen(new Float64Array(0), 0).values).toHaveLength(0);
  });
});
