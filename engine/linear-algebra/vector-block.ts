import { dot } from './dense';

/** Elements handled at a time: their stretch of the vector that all others meet stays in the fast cache. */
const CHUNK = 512;
/** After a projection that shortens a vector below this fraction, it is projected once more. */
const LOST_LENGTH = Math.SQRT1_2;
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
    this.#addCombination(
      target,
      Float64Array.from({ length: rows }, (_, i) => coefficients[i * columns + column]),
    );
  }

  /** The products of all vectors of the block with one. */
  dots(vector: Float64Array): Float64Array {
    const sums = new Float64Array(this.#size);
    for (let start = 0; start < this.dimension; start += CHUNK) {
      const end = Math.min(start + CHUNK, this.dimension);
      for (let i = 0; i < this.#size; i += 4) addFourDots(sums, i, this.#vectors, vector, start, end);
    }
    return sums;
  }

  #addCombination(target: Float64Array, factors: Float64Array): void {
    for (let start = 0; start < this.dimension; start += CHUNK) {
      const end = Math.min(start + CHUNK, this.dimension);
      for (let i = 0; i < factors.length; i += 4) addFour(target, factors, i, this.#vectors, start, end);
    }
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
   * Makes a vector of unit length and orthogonal to all of the block, in place. Projected again until a pass takes
   * little away, for one Gram–Schmidt pass leaves rounding errors as large as what it took away is to what it left.
   *
   * @returns false if less than `smallest` of the direction is new; the vector is then of no use
   */
  orthonormalise(vector: Float64Array, smallest: number): boolean {
    const length = Math.sqrt(dot(vector, vector));
    if (!(length > 0)) return false;
    scale(vector, 1 / length);
    let remaining = 1;
    for (let pass = 0; pass < MOST_PROJECTIONS; pass++) {
      this.#addCombination(
        vector,
        this.dots(vector).map((overlap) => -overlap),
      );
      const kept = Math.sqrt(dot(vector, vector));
      remaining *= kept;
      if (!(remaining > smallest)) return false;
      scale(vector, 1 / kept);
      if (kept > LOST_LENGTH) return true;
    }
    return false;
  }
}

function scale(vector: Float64Array, factor: number): void {
  for (let i = 0; i < vector.length; i++) vector[i] *= factor;
}

/** Adds four vectors at once (fewer at the end of the list), so that the target is read and written once for them. */
function addFour(
  target: Float64Array,
  factors: Float64Array,
  first: number,
  vectors: readonly Float64Array[],
  start: number,
  end: number,
): void {
  const last = factors.length - 1;
  // a vector beyond the last is the last one with the factor 0
  const factor = (i: number) => (i <= last ? factors[i] : 0);
  const [fa, fb, fc, fd] = [factor(first), factor(first + 1), factor(first + 2), factor(first + 3)];
  const a = vectors[first];
  const b = vectors[Math.min(first + 1, last)];
  const c = vectors[Math.min(first + 2, last)];
  const d = vectors[Math.min(first + 3, last)];
  for (let k = start; k < end; k++) target[k] += fa * a[k] + fb * b[k] + fc * c[k] + fd * d[k];
}

/** The same for products with one vector: four sums that do not wait for each other. */
function addFourDots(
  sums: Float64Array,
  first: number,
  vectors: readonly Float64Array[],
  vector: Float64Array,
  start: number,
  end: number,
): void {
  const last = sums.length - 1;
  const a = vectors[first];
  const b = vectors[Math.min(first + 1, last)];
  const c = vectors[Math.min(first + 2, last)];
  const d = vectors[Math.min(first + 3, last)];
  let [sa, sb, sc, sd] = [0, 0, 0, 0];
  for (let k = start; k < end; k++) {
    const value = vector[k];
    sa += a[k] * value;
    sb += b[k] * value;
    sc += c[k] * value;
    sd += d[k] * value;
  }
  sums[first] += sa;
  if (first < last) sums[first + 1] += sb;
  if (first + 1 < last) sums[first + 2] += sc;
  if (first + 2 < last) sums[first + 3] += sd;
}
