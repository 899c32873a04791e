import { addScaledInto, dot } from './dense';

/** Elements rotated at a time: the stretch of all vectors stays in the cache. */
const CHUNK = 512;
/** After a projection that shortens a vector below this fraction, it is projected once more. */
const LOST_LENGTH = 0.1;
const MOST_PROJECTIONS = 4;

/** A growing list of vectors of one length that keeps its memory when it shrinks. */
export class VectorBlock {
  readonly #vectors: Float64Array[] = [];
  #size = 0;

  constructor(readonly dimension: number) {}

  get size(): number {
    return this.#size;
  }

  at(index: number): Float64Array {
    return this.#vectors[index];
  }

  /** Room for the next vector, not yet part of the block; its content is the caller's to write. */
  spare(): Float64Array {
    if (this.#size === this.#vectors.length) this.#vectors.push(new Float64Array(this.dimension));
    return this.#vectors[this.#size];
  }

  /** Makes the spare vector part of the block and returns it. */
  append(): Float64Array {
    const vector = this.spare();
    this.#size++;
    return vector;
  }

  /** target ← Σᵢ coefficients(i, column)·vector i. Coefficients row-major, i below `rows`. */
  combineInto(
    target: Float64Array,
    coefficients: Float64Array,
    rows: number,
    columns: number,
    column: number,
  ): void {
    target.fill(0);
    for (let i = 0; i < rows; i++)
      addScaledInto(target, coefficients[i * columns + column], this.#vectors[i]);
  }

  /** The block becomes combinations of its first `rows` vectors, one per column of coefficients (row-major). */
  rotate(coefficients: Float64Array, rows: number, columns: number): void {
    const old = new Float64Array(rows * CHUNK);
    for (let start = 0; start < this.dimension; start += CHUNK) {
      const length = Math.min(CHUNK, this.dimension - start);
      for (let i = 0; i < rows; i++) {
        old.set(this.#vectors[i].subarray(start, start + length), i * CHUNK);
      }
      for (let k = 0; k < columns; k++) {
        const target = this.#vectors[k];
        target.fill(0, start, start + length);
        for (let i = 0; i < rows; i++) {
          const factor = coefficients[i * columns + k];
          const row = i * CHUNK - start;
          for (let e = start; e < start + length; e++) target[e] += factor * old[row + e];
        }
      }
    }
    this.#size = columns;
  }

  /**
   * Makes a vector of unit length and orthogonal to all of the block, in place. Projected at least twice, for
   * one Gram–Schmidt pass leaves rounding errors as large as what it took away is to what it left.
   *
   * @returns false if less than `smallest` of the direction is new; the vector is then of no use
   */
  orthonormalise(vector: Float64Array, smallest: number): boolean {
    const length = Math.sqrt(dot(vector, vector));
    if (!(length > 0)) return false;
    scale(vector, 1 / length);
    let remaining = 1;
    for (let pass = 0; pass < MOST_PROJECTIONS; pass++) {
      for (let i = 0; i < this.#size; i++)
        addScaledInto(vector, -dot(this.#vectors[i], vector), this.#vectors[i]);
      const kept = Math.sqrt(dot(vector, vector));
      remaining *= kept;
      if (!(remaining > smallest)) return false;
      scale(vector, 1 / kept);
      if (pass > 0 && kept > LOST_LENGTH) return true;
    }
    return false;
  }
}

function scale(vector: Float64Array, factor: number): void {
  for (let i = 0; i < vector.length; i++) vector[i] *= factor;
}
