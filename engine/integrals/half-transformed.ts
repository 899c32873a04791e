import { kernelForm } from '../kernels/form';
import { scratchMemory } from '../kernels/kernel-memory';
import type { PackedMatrices } from './matrix-transformation';

/** Results that are turned round together: the numbers of one line of the cache. */
const TOGETHER = 8;

/**
 * What the first of two sweeps leaves: for each pair of functions μν a row of results x, to be read for each x as a
 * symmetric matrix over μν. It is kept in the blocks in which it comes, and turned a block at a time.
 */
export class HalfTransformed implements PackedMatrices {
  readonly #data: Float64Array;
  /** matrices of a block but for the last one, known from the first that comes */
  #blockWidth = 1;

  /**
   * @param functionPairs - matrices of the first sweep
   * @param count - results kept for each
   * @param data - functionPairs·count numbers, in whatever state
   */
  private constructor(
    readonly functionPairs: number,
    readonly count: number,
    data: Float64Array,
  ) {
    this.#data = data;
  }

  /**
   * Gives `work` an empty one, which ends with it. From one point of a curve to the next it is the same memory: to
   * get fresh memory from the system takes as long as to fill it.
   */
  static use<Result>(
    functionPairs: number,
    count: number,
    work: (halfTransformed: HalfTransformed) => Result,
  ): Result {
    const length = functionPairs * count;
    const workOn = (data: Float64Array) => work(new HalfTransformed(functionPairs, count, data));
    if (kernelForm() === 'plain') return workOn(new Float64Array(length));
    const memory = scratchMemory();
    return memory.scope(() => workOn(memory.float64IfThereIsRoom(length)?.view ?? new Float64Array(length)));
  }

  /** All results of the matrices first … first + width, result by result. */
  keep(first: number, width: number, results: Float64Array): void {
    if (first === 0) this.#blockWidth = width;
    this.#data.set(results.subarray(0, this.count * width), this.count * first);
  }

  loadInto(block: Float64Array, first: number, width: number): void {
    const data = this.#data;
    for (let pair = 0; pair < this.functionPairs; pair += this.#blockWidth) {
      const length = Math.min(this.#blockWidth, this.functionPairs - pair);
      const source = this.count * pair + first * length;
      for (let from = 0; from < width; from += TOGETHER) {
        const to = Math.min(from + TOGETHER, width);
        for (let i = 0; i < length; i++) {
          const target = (pair + i) * width;
          for (let k = from; k < to; k++) block[target + k] = data[source + k * length + i];
        }
      }
    }
  }
}
