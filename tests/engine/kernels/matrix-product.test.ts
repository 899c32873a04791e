import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { KernelMemory } from '../../../engine/kernels/kernel-memory';
import { productIn, rowsAt, transposed } from '../../../engine/kernels/matrix-product';
import { relativeDifference } from '../../support/kernel-forms';
import { randomArray, seededRandom } from '../../support/random';

const memory = new KernelMemory();
const addProduct = productIn(memory);

/** C + factor·A·B, element by element from the definition. */
function byDefinition(
  c: Float64Array,
  elementA: (i: number, k: number) => number,
  elementB: (k: number, j: number) => number,
  [rows, inner, columns]: readonly number[],
  factor: number,
): Float64Array {
  const sum = c.slice();
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
  factor: number,
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
      c.view,
      (i, k) => a.view[turnA ? k * rows + i : i * inner + k],
      (k, j) => b.view[turnB ? j * inner + k : k * columns + j],
      sizes,
      factor,
    );
    const placedA = turnA ? transposed(rowsAt(a.address, rows)) : rowsAt(a.address, inner);
    const placedB = turnB ? transposed(rowsAt(b.address, inner)) : rowsAt(b.address, columns);
    addProduct(rowsAt(c.address, columns), placedA, placedB, ...sizes, factor);
    expect(relativeDifference(c.view.slice(), expected)).toBeLessThan(1e-13);
    expect(behind.view.every((value) => value === 3)).toBe(true);
  });
}

describe('addProduct', () => {
  it('independent: C + factor·A·B of any sizes and transpositions is its definition', () => {
    const size = fc.integer({ min: 1, max: 19 });
    fc.assert(
      fc.property(
        fc.tuple(size, size, size),
        fc.boolean(),
        fc.boolean(),
        fc.constantFrom(1, -1, 0.3),
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
    expectProduct(sizes, false, false, 1, 3);
    expectProduct(sizes, true, true, -1, 4);
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
      addProduct(
        { ...rowsAt(c.address + 8 * (9 + 2), 9) },
        rowsAt(a.address, 3),
        rowsAt(a.address, 5),
        5,
        3,
        5,
      );
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
