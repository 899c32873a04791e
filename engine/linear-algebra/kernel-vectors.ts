import type { KernelMemory } from '../kernels/kernel-memory';
import {
  mostThreads,
  runTasks,
  VECTOR_COMBINATIONS,
  VECTOR_DOTS,
  VECTOR_ROTATIONS,
} from '../kernels/thread-team';
import { ROTATED_ELEMENTS, TASK_ELEMENTS } from '../kernels/vector-algebra';
import { plainVectors, type VectorAlgebra } from './vector-algebra';

/** From here on a pass over ten vectors takes a millisecond, and threads are worth waking for it. */
const LONG = 200_000;

/** Of a kernel memory, what vectors may take; the rest is for all others that work in it. */
const ROOM_BYTES = 3.25 * 2 ** 30;
/** Vectors that a product copies into the memory where they stand outside. */
const COPIES = 2;

/**
 * The same by the kernels of engine/kernels/assembly/vector-algebra.ts, long vectors shared among threads; results
 * do not depend on who takes part. The vectors stand in a kernel memory as long as they fit, and stay there until the
 * scope ends in which they were first taken: for a whole calculation there is one of these, so that what one part
 * gives back serves the next.
 */
export class KernelVectors implements VectorAlgebra {
  readonly #addresses = new Map<Float64Array, number>();
  readonly #free: { readonly address: number; readonly view: Float64Array }[] = [];

  /** vectors that may still come into the memory */
  #left: number;

  /**
   * @param longest - length of the longest vector that will be taken
   * @param expected - vectors that will be held at most; if they do not all fit, some stand outside
   */
  constructor(
    private readonly memory: KernelMemory,
    private readonly longest: number,
    expected: number,
  ) {
    const fitting = Math.floor(ROOM_BYTES / (8 * longest));
    this.#left = expected <= fitting ? fitting : fitting - COPIES;
  }

  take(dimension: number): Float64Array {
    const block = this.#free.pop() ?? this.#takeBlock();
    if (!block) return plainVectors.take(dimension);
    const vector = block.view.subarray(0, dimension);
    this.#addresses.set(vector, block.address);
    return vector;
  }

  #takeBlock() {
    if (this.#left <= 0) return undefined;
    this.#left--;
    return this.memory.float64IfThereIsRoom(this.longest);
  }

  giveBack(vector: Float64Array): void {
    const address = this.#addresses.get(vector);
    if (address === undefined) return;
    this.#addresses.delete(vector);
    this.#free.push({ address, view: new Float64Array(vector.buffer, address, this.longest) });
  }

  dots(vectors: readonly Float64Array[], vector: Float64Array): Float64Array {
    const pass = this.#addressesOf(vectors, vector);
    if (!pass) return plainVectors.dots(vectors, vector);
    const count = vectors.length;
    const sums = new Float64Array(count);
    this.#run(VECTOR_DOTS, pass, vector.length, { sumsPerTask: count }, (ofTasks) => {
      ofTasks.forEach((sum, k) => {
        sums[k % count] += sum;
      });
    });
    return sums;
  }

  combine(
    target: Float64Array,
    own: number,
    vectors: readonly Float64Array[],
    factors: ArrayLike<number>,
  ): number {
    const pass = this.#addressesOf(vectors, target);
    if (!pass) return plainVectors.combine(target, own, vectors, factors);
    let square = 0;
    this.#run(VECTOR_COMBINATIONS, pass, target.length, { own, factors, sumsPerTask: 1 }, (ofTasks) => {
      for (const part of ofTasks) square += part;
    });
    return square;
  }

  rotate(vectors: readonly Float64Array[], coefficients: Float64Array, columns: number): void {
    const pass = this.#addressesOf(vectors, vectors[0]);
    if (!pass) plainVectors.rotate(vectors, coefficients, columns);
    else this.#run(VECTOR_ROTATIONS, pass, vectors[0].length, { factors: coefficients, columns });
  }

  /** Undefined if one of them does not stand in the memory. */
  #addressesOf(vectors: readonly Float64Array[], target: Float64Array): Addresses | undefined {
    const ofTarget = this.#addresses.get(target);
    const read = vectors.map((vector) => this.#addresses.get(vector) ?? 0);
    return ofTarget === undefined || read.includes(0) ? undefined : { read, target: ofTarget };
  }

  #run(
    kernel: number,
    { read, target }: Addresses,
    dimension: number,
    pass: { own?: number; factors?: ArrayLike<number>; columns?: number; sumsPerTask?: number },
    takeSums: (sums: Float64Array) => void = () => undefined,
  ): void {
    const { memory } = this;
    const { own = 0, factors = [], columns = 0, sumsPerTask = 0 } = pass;
    const tasks = Math.ceil(dimension / TASK_ELEMENTS);
    memory.scope(() => {
      const addresses = memory.int32(read.length);
      addresses.view.set(read);
      const numbers = memory.float64(1 + factors.length);
      numbers.view[0] = own;
      numbers.view.set(factors, 1);
      const sums = memory.float64(tasks * sumsPerTask);
      const scratch = memory.float64(columns > 0 ? mostThreads() * read.length * ROTATED_ELEMENTS : 0);
      const record = memory.int32(9);
      record.view.set([
        dimension,
        read.length,
        addresses.address,
        numbers.address + 8,
        target,
        sums.address,
        numbers.address,
        columns,
        scratch.address,
      ]);
      runTasks(memory, kernel, record.address, tasks, dimension >= LONG);
      takeSums(sums.view);
    });
  }
}

interface Addresses {
  readonly read: readonly number[];
  readonly target: number;
}
