/** What an iterative method does with many long vectors of one length, in one pass for all of them. */
export interface VectorAlgebra {
  /** A vector to write into, its content arbitrary. Operations are fastest on vectors that come from here. */
  take(dimension: number): Float64Array;
  /** Leaves a vector that came from `take`, so that its memory is used again. */
  giveBack(vector: Float64Array): void;
  /** The products of all vectors with one. */
  dots(vectors: readonly Float64Array[], vector: Float64Array): Float64Array;
  /** target ← own·target + Σᵢ factorᵢ·vectorᵢ; a target of which nothing is kept may hold anything. @returns |target|² */
  combine(
    target: Float64Array,
    own: number,
    vectors: readonly Float64Array[],
    factors: ArrayLike<number>,
  ): number;
  /** The first `columns` vectors become combinations of all: one per column of coefficients, row-major. */
  rotate(vectors: readonly Float64Array[], coefficients: Float64Array, columns: number): void;
}

/** Elements handled at a time: their stretch of the vector that all others meet stays in the fast cache. */
const CHUNK = 512;

/** In plain TypeScript: the reference for `KernelVectors`. */
export const plainVectors: VectorAlgebra = {
  take: (dimension) => new Float64Array(dimension),

  giveBack: () => undefined,

  dots(vectors, vector) {
    const sums = new Float64Array(vectors.length);
    for (let start = 0; start < vector.length; start += CHUNK) {
      const end = Math.min(start + CHUNK, vector.length);
      for (let i = 0; i < vectors.length; i += 4) addFourDots(sums, i, vectors, vector, start, end);
    }
    return sums;
  },

  combine(target, own, vectors, factors) {
    let square = 0;
    for (let start = 0; start < target.length; start += CHUNK) {
      const end = Math.min(start + CHUNK, target.length);
      if (own === 0) target.fill(0, start, end);
      else if (own !== 1) for (let k = start; k < end; k++) target[k] *= own;
      for (let i = 0; i < vectors.length; i += 4) addFour(target, factors, i, vectors, start, end);
      for (let k = start; k < end; k++) square += target[k] ** 2;
    }
    return square;
  },

  rotate(vectors, coefficients, columns) {
    const [{ length: dimension }] = vectors;
    const old = vectors.map(() => new Float64Array(CHUNK));
    for (let start = 0; start < dimension; start += CHUNK) {
      const end = Math.min(start + CHUNK, dimension);
      vectors.forEach((vector, i) => {
        old[i].set(vector.subarray(start, end));
      });
      for (let k = 0; k < columns; k++) {
        const factors = vectors.map((_, i) => coefficients[i * columns + k]);
        plainVectors.combine(vectors[k].subarray(start, end), 0, old, factors);
      }
    }
  },
};

/** Adds four vectors at once (fewer at the end of the list), so that the target is read and written once for them. */
function addFour(
  target: Float64Array,
  factors: ArrayLike<number>,
  first: number,
  vectors: readonly Float64Array[],
  start: number,
  end: number,
): void {
  const last = vectors.length - 1;
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
