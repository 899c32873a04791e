import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { transposedProductInto } from '../../../engine/integrals/contraction';

const size = fc.integer({ min: 1, max: 7 });
const numbers = fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 49, maxLength: 49 });

describe('transposedProductInto', () => {
  it('independent: the product as written, for even and odd sizes', () => {
    fc.assert(
      fc.property(
        size,
        size,
        size,
        numbers,
        numbers,
        fc.boolean(),
        (rows, m, n, left, right, isLowerTriangle) => {
          const width = isLowerTriangle ? m : n;
          const a = Float64Array.from(left.slice(0, rows * m));
          const b = Float64Array.from(right.slice(0, rows * width));
          const target = new Float64Array(m * width).fill(9);
          transposedProductInto(a, m, b, width, rows, target, isLowerTriangle);
          for (let i = 0; i < m; i++) {
            for (let j = 0; j < (isLowerTriangle ? i + 1 : width); j++) {
              let expected = 0;
              for (let k = 0; k < rows; k++) expected += a[k * m + i] * b[k * width + j];
              expect(Math.abs(target[i * width + j] - expected)).toBeLessThan(1e-14);
            }
          }
        },
      ),
      { seed: 13, numRuns: 200 },
    );
  });
});
