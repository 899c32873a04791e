import { Worker } from 'node:worker_threads';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { HELPER_FILE } from '../../../app/calculation/program';
import { KernelMemory } from '../../../engine/kernels/kernel-memory';
import { acceptHelpers, allowHelpers, helpedTasks } from '../../../engine/kernels/thread-team';
import { KernelVectors } from '../../../engine/linear-algebra/kernel-vectors';
import { plainVectors, type VectorAlgebra } from '../../../engine/linear-algebra/vector-algebra';
import { randomArray, seededRandom } from '../../support/random';

const sizes = fc.record({
  // around the borders of vectors of two, chunks and tasks
  dimension: fc.constantFrom(1, 2, 3, 7, 511, 1024, 1025, 5000, 16383, 16384, 16385, 33001),
  count: fc.integer({ min: 1, max: 10 }),
  own: fc.constantFrom(0, 1, -0.7),
  seed: fc.nat(10_000),
});

function takeRandom(algebra: VectorAlgebra, dimension: number, seed: number): Float64Array {
  const vector = algebra.take(dimension);
  vector.set(randomArray(dimension, seededRandom(seed)));
  return vector;
}

/** All that an algebra makes of the same random vectors. */
function results(algebra: VectorAlgebra, dimension: number, count: number, own: number, seed: number) {
  const vectors = Array.from({ length: count }, (_, k) => takeRandom(algebra, dimension, seed + k));
  const target = takeRandom(algebra, dimension, seed + count);
  // what stands in a target of which nothing is kept must not matter
  if (own === 0) target.fill(Number.NaN);
  const factors = randomArray(count, seededRandom(seed));
  const square = algebra.combine(target, own, vectors, factors);
  const dots = algebra.dots(vectors, target);
  const columns = Math.ceil(count / 2);
  algebra.rotate(vectors, randomArray(count * columns, seededRandom(seed + 1)), columns);
  const numbers = [Float64Array.of(square), dots, target.slice(), ...vectors.map((vector) => vector.slice())];
  for (const vector of [...vectors, target]) algebra.giveBack(vector);
  return numbers;
}

/** Largest difference, relative to the length of what it stands in and of the vectors behind it. */
function deviation(left: readonly Float64Array[], right: readonly Float64Array[], dimension: number): number {
  let largest = 0;
  left.forEach((numbers, k) => {
    const scale = Math.max(...numbers.map(Math.abs), k < 2 ? dimension : 1);
    numbers.forEach((value, i) => {
      const difference = Math.abs(value - right[k][i]) / scale;
      // not a number must not pass
      if (!(difference <= largest)) largest = difference;
    });
  });
  return largest;
}

/** Numbers that are not the same. */
function differences(left: readonly Float64Array[], right: readonly Float64Array[]): number {
  return left.reduce(
    (sum, numbers, k) => sum + numbers.filter((value, i) => !Object.is(value, right[k][i])).length,
    0,
  );
}

describe('KernelVectors', () => {
  it('independent: combinations, scalar products and rotations are those of plain TypeScript, for any lengths and counts', () => {
    const kernels = new KernelVectors(new KernelMemory(), 33001, 11);
    fc.assert(
      fc.property(sizes, ({ dimension, count, own, seed }) => {
        const fast = results(kernels, dimension, count, own, seed);
        const plain = results(plainVectors, dimension, count, own, seed);
        expect(deviation(fast, plain, dimension)).toBeLessThan(1e-11);
      }),
      { seed: 21, numRuns: 40 },
    );
  });

  it('identity: vectors given back are taken again, and one from elsewhere is handled too', () => {
    const memory = new KernelMemory();
    const kernels = new KernelVectors(memory, 100, 3);
    const first = takeRandom(kernels, 100, 1);
    const outside = randomArray(100, seededRandom(2));
    const expected = plainVectors.dots([first.slice()], outside);
    expect(kernels.dots([first], outside)).toEqual(expected);
    const place = first.byteOffset;
    kernels.giveBack(first);
    kernels.giveBack(outside);
    expect(kernels.take(50).byteOffset).toBe(place);
    expect(kernels.take(100).byteOffset).not.toBe(place);
  });

  it('identity: long vectors beyond what fits stand outside, and leave room for two copies of them', () => {
    const memory = new KernelMemory();
    const gibibyte = 2 ** 27;
    const kernels = new KernelVectors(memory, gibibyte, 4);
    const vectors = [1, 2].map((seed) => takeRandom(kernels, 1000, seed));
    expect(vectors.map((vector) => memory.addressOf(vector) !== undefined)).toEqual([true, false]);
    const expected = plainVectors.dots([vectors[1]], vectors[0].slice());
    expect(kernels.dots([vectors[1]], vectors[0])).toEqual(expected);
    const all = new KernelVectors(new KernelMemory(), gibibyte, 3);
    expect([1, 2, 3].every(() => all.take(10).buffer instanceof SharedArrayBuffer)).toBe(true);
  });

  it('independent: work shared among three threads gives the same, to the last bit', async () => {
    const dimension = 220_001;
    const alone = results(new KernelVectors(new KernelMemory(), dimension, 5), dimension, 3, -0.3, 5);
    const helpers: Worker[] = [];
    let shared: SharedArrayBuffer | undefined;
    acceptHelpers({
      most: 2,
      start: (memory, control) => {
        shared = control;
        for (const helper of [0, 1]) {
          helpers.push(new Worker(HELPER_FILE, { workerData: { memory, control, helper } }));
        }
      },
    });
    try {
      const together = new KernelVectors(new KernelMemory(), dimension, 5);
      expect(differences(results(together, dimension, 3, -0.3, 5), alone)).toBe(0);
      allowHelpers(shared!, 2);
      await Promise.all(helpers.map((helper) => new Promise((resolve) => helper.once('online', resolve))));
      const vector = takeRandom(together, dimension, 1);
      // the first passes may be over before the helpers have looked
      for (let pass = 0; pass < 5000 && helpedTasks(shared!) === 0; pass++) together.dots([vector], vector);
      expect(differences(results(together, dimension, 3, -0.3, 5), alone)).toBe(0);
      expect(helpedTasks(shared!)).toBeGreaterThan(0);
    } finally {
      await Promise.all(helpers.map((helper) => helper.terminate()));
      acceptHelpers({ most: 0, start: () => undefined });
    }
  });
});
