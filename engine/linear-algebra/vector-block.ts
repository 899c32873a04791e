import { plainVectors, type VectorAlgebra } from './vector-algebra';

/** After a projection that shortens a vector below this fraction, it is projected once more. */
const LOST_LENGTH = Math.SQRT1_2;
const MOST_PROJECTIONS = 4;

/** A growing list of vectors of one length that keeps its memory when it shrinks. */
export class VectorBlock {
  readonly #vectors: Float64Array[] = [];
  #size = 0;

  constructor(
    readonly dimension: number,
    private readonly algebra: VectorAlgebra = plainVectors,
  ) {}

  get size(): number {
    return this.#size;
  }

  /** The vectors of the block. */
  get members(): readonly Float64Array[] {
    return this.#vectors.slice(0, this.#size);
  }

  at(index: number): Float64Array {
    return this.#vectors[index];
  }

  /** Room for the next vector, not yet part of the block; its content is the caller's to write. */
  spare(): Float64Array {
    if (this.#size === this.#vectors.length) this.#vectors.push(this.algebra.take(this.dimension));
    return this.#vectors[this.#size];
  }

  /** Makes the spare vector part of the block and returns it. */
  append(): Float64Array {
    const vector = this.spare();
    this.#size++;
    return vector;
  }

  /** Ends the use of the block: returns its vectors, and gives the memory of others back that it has held. */
  release(): readonly Float64Array[] {
    const held = this.#vectors.splice(0);
    const members = held.splice(0, this.#size);
    for (const vector of held) this.algebra.giveBack(vector);
    this.#size = 0;
    return members;
  }

  /** The products of all vectors of the block with one. */
  dots(vector: Float64Array): Float64Array {
    return this.algebra.dots(this.members, vector);
  }

  /** The block becomes combinations of its vectors, one per column of coefficients (row-major). */
  rotate(coefficients: Float64Array, columns: number): void {
    this.algebra.rotate(this.members, coefficients, columns);
    this.#size = columns;
  }

  /**
   * Makes a vector of unit length and orthogonal to all of the block, in place. Projected again until a pass takes
   * little away, for one Gram–Schmidt pass leaves rounding errors as large as what it took away is to what it left.
   *
   * @returns false if less than `smallest` of the direction is new; the vector is then of no use
   */
  orthonormalise(vector: Float64Array, smallest: number): boolean {
    const { members } = this;
    let remaining = 1;
    for (let pass = 0; pass < MOST_PROJECTIONS; pass++) {
      const overlaps = this.algebra.dots([...members, vector], vector);
      const length = Math.sqrt(overlaps[members.length]);
      if (!(length > 0)) return false;
      const factors = Float64Array.from(members, (_, i) => -overlaps[i] / length);
      const kept = Math.sqrt(this.algebra.combine(vector, 1 / length, members, factors));
      remaining *= kept;
      if (!(remaining > smallest)) return false;
      if (kept > LOST_LENGTH) {
        this.algebra.combine(vector, 1 / kept, [], []);
        return true;
      }
    }
    return false;
  }
}
