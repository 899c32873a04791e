import fc from 'fast-check';
import { Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import {
  congruence,
  maximumAbsolute,
  multiply,
  multiplyLeftTransposed,
  multiplyRightTransposed,
} from '../../../engine/linear-algebra/dense';
import { inForm, relativeDifference } from '../../support/kernel-forms';
import { randomArray, seededRandom } from '../../support/random';

const random = seededRandom(1);
const asMatrix = (data: Float64Array, rows: number, columns: number) =>
  Matrix.from1DArray(rows, columns, [...data]);

function expectSame(actual: Float64Array, expected: Matrix): void {
  const difference = actual.map((value, i) => value - expected.to1DArray()[i]);
  expect(maximumAbsolute(difference)).toBeLessThan(1e-14);
}

describe('dense products', () => {
  const a = randomArray(5 * 3, random);
  const b = randomArray(3 * 4, random);
  const c = randomArray(5 * 4, random);
  const d = randomArray(7 * 3, random);

  it('independent: A·B, Aᵀ·B and A·Bᵀ of rectangular matrices equal those of ml-matrix', () => {
    expectSame(multiply(a, b, 5, 3, 4), asMatrix(a, 5, 3).mmul(asMatrix(b, 3, 4)));
    expectSame(
      multiplyLeftTransposed(a, c, 3, 5, 4),
      asMatrix(a, 5, 3)
        .transpose()
        .mmul(asMatrix(c, 5, 4)),
    );
    expectSame(multiplyRightTransposed(a, d, 5, 3, 7), asMatrix(a, 5, 3).mmul(asMatrix(d, 7, 3).transpose()));
  });

  it('independent: the fast forms give what the plain ones do', () => {
    const size = fc.integer({ min: 1, max: 40 });
    fc.assert(
      fc.property(
        fc.constantFrom(multiply, multiplyLeftTransposed, multiplyRightTransposed),
        size,
        size,
        size,
        fc.integer(),
        (product, rows, inner, columns, seed) => {
          const numbers = seededRandom(seed);
          const left = randomArray(rows * inner, numbers);
          const right = randomArray(inner * columns, numbers);
          const [fast, plain] = (['fast', 'plain'] as const).map((form) =>
            inForm(form, () => product(left, right, rows, inner, columns)),
          );
          expect(relativeDifference(fast, plain)).toBeLessThan(1e-12);
        },
      ),
      { seed: 3 },
    );
  });

  it('independent: Xᵀ·A·X equals that of ml-matrix', () => {
    const square = randomArray(25, random);
    const x = asMatrix(a, 5, 3);
    expectSame(
      congruence(square, a, 5, 3),
      x
        .transpose()
        .mmul(asMatrix(square, 5, 5))
        .mmul(x),
    );
  });

  it('identity: the largest absolute value of an array with NaN is NaN, so that it cannot pass as small', () => {
    expect(maximumAbsolute(Float64Array.of(1, Number.NaN, -3))).toBeNaN();
    expect(maximumAbsolute(Float64Array.of(1, -3, 2))).toBe(3);
  });
});
