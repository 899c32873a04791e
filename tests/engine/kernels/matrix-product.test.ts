import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { KernelMemory } from '../../../engine/kernels/kernel-memory';
import { type ProductOptions, productIn, rowsAt, transposed } from '../../../engine/kernels/matrix-product';
import { relativeDifference } from '../../support/kernel-forms';
import { randomArray, seededRandom } from '../../support/random';

const memory = new KernelMemory();
const productInto = productIn(memory);

/** factor·A·B, element by element from the definition, added to `sum`. */
function byDefinition(
  sum: Float64Array,
  elementA: (i: number, k: number) => number,
  elementB: (k: number, j: number) => number,
  [rows, inner, columns]: readonly number[],
  factor: number,
): Float64Array {
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) {
      for (let k = 0; k < inner; k++) sum[i * columns + j] += factor * elementA(i, k) * elementB(k, j);
    }
  }
  return sum;
}

function expectProduct(
  sizes: readonly [number, number, number],
  turnA: boolean,
  turnB: boolean,
  options: ProductOptions,
  seed: number,
): void {
  const [rows, inner, columns] = sizes;
  const random = seededRandom(seed);
  memory.scope(() => {
    const [a, b, c] = [rows * inner, inner * columns, rows * columns].map((length) => {
      const block = memory.float64(length);
      block.view.set(randomArray(length, random));
      return block;
    });
    const behind = memory.float64(8);
    behind.view.fill(3);
    const expected = byDefinition(
      options.isAdded ? c.view.slice() : new Float64Array(rows * columns),
      (i, k) => a.view[turnA ? k * rows + i : i * inner + k],
      (k, j) => b.view[turnB ? j * inner + k : k * columns + j],
      sizes,
      options.factor ?? 1,
    );
    const placedA = turnA ? transposed(rowsAt(a.address, rows)) : rowsAt(a.address, inner);
    const placedB = turnB ? transposed(rowsAt(b.address, inner)) : rowsAt(b.address, columns);
    productInto(rowsAt(c.address, columns), placedA, placedB, ...sizes, options);
    expect(relativeDifference(c.view.slice(), expected)).toBeLessThan(1e-13);
    expect(behind.view.every((value) => value === 3)).toBe(true);
  });
}

describe('productInto', () => {
  it('independent: C = factor·A·B and C += factor·A·B of any sizes and transpositions is its definition', () => {
    const size = fc.integer({ min: 1, max: 19 });
    const inner = fc.integer({ min: 0, max: 19 });
    fc.assert(
      fc.property(
        fc.tuple(size, inner, size),
        fc.boolean(),
        fc.boolean(),
        fc.record({ factor: fc.constantFrom(1, -1, 0.3), isAdded: fc.boolean() }),
        fc.integer(),
        expectProduct,
      ),
      { seed: 2, numRuns: 150 },
    );
  });

  it.each([
    [3, 500, 5],
    [250, 7, 9],
    [5, 6, 800],
    [101, 203, 405],
  ])('independent: the same beyond one block, %i × %i × %i', (...sizes) => {
    expectProduct(sizes, false, false, {}, 3);
    expectProduct(sizes, true, true, { factor: -1, isAdded: true }, 4);
  });

  it('identity: only the part of a larger matrix that was named is touched', () => {
    memory.scope(() => {
      const a = memory.float64(30);
      const c = memory.float64(63);
      a.view.forEach((_, i) => {
        a.view[i] = i;
      });
      c.view.fill(0.5);
      // rows 1 … 5 and columns 2 … 6 of a 7×9 matrix
      productInto(rowsAt(c.address + 8 * (9 + 2), 9), rowsAt(a.address, 3), rowsAt(a.address, 5), 5, 3, 5, {
        isAdded: true,
      });
      c.view.forEach((value, place) => {
        const [i, j] = [Math.floor(place / 9) - 1, (place % 9) - 2];
        let sum = 0.5;
        if (i >= 0 && i < 5 && j >= 0 && j < 5) {
          for (let k = 0; k < 3; k++) sum += (3 * i + k) * (5 * k + j);
        }
        expect(value).toBe(sum);
      });
    });
  });
});
