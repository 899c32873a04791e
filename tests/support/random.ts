/** Seeded uniform numbers in [0, 1): mulberry32, so that a failing test can be run again. */
export function seededRandom(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

/** Random entries in [−1, 1). */
export function randomArray(length: number, random: () => number): Float64Array {
  return Float64Array.from({ length }, () => 2 * random() - 1);
}

/** Random symmetric n×n matrix, row-major. */
export function randomSymmetric(n: number, random: () => number): Float64Array {
  const matrix = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      const value = 2 * random() - 1;
      matrix[i * n + j] = value;
      matrix[j * n + i] = value;
    }
  }
  return matrix;
}
