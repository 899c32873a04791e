export interface Tridiagonal {
  readonly diagonal: Float64Array;
  /** element i stands beside the diagonal elements i − 1 and i; element 0 is zero */
  readonly offDiagonal: Float64Array;
  /** |u|²/2 of each reflection 1 − u·uᵀ/(|u|²/2); 0: none */
  readonly halfSquares: Float64Array;
}

/**
 * Householder's reduction of a symmetric matrix to tridiagonal form, from the last row upwards.
 *
 * A reflection changes all rows above its own by A ← A − v·wᵀ − w·vᵀ. That change waits until the next reflection
 * must multiply the same rows with its own vector, so that every step goes over the matrix once.
 *
 * @param a - n×n, row-major, its largest element near 1, lower triangle read; row i becomes the vector u of the reflection that it defines
 */
export function tridiagonalise(a: Float64Array, n: number): Tridiagonal {
  const diagonal = new Float64Array(n);
  const offDiagonal = new Float64Array(n);
  const halfSquares = new Float64Array(n);
  const v = new Float64Array(n);
  const w = new Float64Array(n);
  const product = new Float64Array(n);
  for (let i = n - 1; i >= 0; i--) {
    const row = i * n;
    for (let k = 0; k <= i; k++) a[row + k] -= v[i] * w[k] + w[i] * v[k];
    diagonal[i] = a[row + i];
    if (i === 0) break;
    const u = a.subarray(row, row + i);
    const half = reflect(u, offDiagonal, i);
    halfSquares[i] = half;
    product.fill(0, 0, i);
    updateAndMultiply(a, n, i, v, w, u, product);
    if (half === 0) {
      v.fill(0);
      w.fill(0);
      continue;
    }
    let overlap = 0;
    for (let k = 0; k < i; k++) {
      product[k] /= half;
      overlap += product[k] * u[k];
    }
    const shift = overlap / (2 * half);
    for (let k = 0; k < i; k++) {
      v[k] = u[k];
      w[k] = product[k] - shift * u[k];
    }
  }
  return { diagonal, offDiagonal, halfSquares };
}

/**
 * A row of less than this squared length, of a matrix whose largest element is near 1, changes no eigenvalue by a unit
 * in its last place. Matrices of low rank leave such rows, each by rounding smaller than the one before, until their
 * squares vanish.
 */
const NOTHING = Number.EPSILON ** 4;

/**
 * Makes of a row the vector u whose reflection leaves only its last element, which is written out.
 *
 * @returns |u|²/2, or 0 where the row has that form already or is as good as zero
 */
function reflect(u: Float64Array, offDiagonal: Float64Array, i: number): number {
  const last = i - 1;
  let rest = 0;
  for (let k = 0; k < last; k++) rest += u[k] * u[k];
  const square = rest + u[last] * u[last];
  if (square < NOTHING) {
    offDiagonal[i] = 0;
    return 0;
  }
  offDiagonal[i] = u[last];
  if (rest === 0) return 0;
  const length = Math.sqrt(square);
  const target = u[last] >= 0 ? -length : length;
  const half = square - u[last] * target;
  offDiagonal[i] = target;
  u[last] -= target;
  return half;
}

/** A ← A − v·wᵀ − w·vᵀ and product ← product + A·u over the leading `size` rows; two rows at once. */
function updateAndMultiply(
  a: Float64Array,
  n: number,
  size: number,
  v: Float64Array,
  w: Float64Array,
  u: Float64Array,
  product: Float64Array,
): void {
  let j = 0;
  for (; j + 2 <= size; j += 2) {
    const first = j * n;
    const second = first + n;
    const [v0, v1, w0, w1, u0, u1] = [v[j], v[j + 1], w[j], w[j + 1], u[j], u[j + 1]];
    let sum0 = 0;
    let sum1 = 0;
    for (let k = 0; k < j; k++) {
      const vk = v[k];
      const wk = w[k];
      const a0 = a[first + k] - v0 * wk - w0 * vk;
      const a1 = a[second + k] - v1 * wk - w1 * vk;
      a[first + k] = a0;
      a[second + k] = a1;
      sum0 += a0 * u[k];
      sum1 += a1 * u[k];
      product[k] += a0 * u0 + a1 * u1;
    }
    const d0 = a[first + j] - 2 * v0 * w0;
    const between = a[second + j] - v1 * w0 - w1 * v0;
    const d1 = a[second + j + 1] - 2 * v1 * w1;
    a[first + j] = d0;
    a[second + j] = between;
    a[second + j + 1] = d1;
    product[j] += sum0 + d0 * u0 + between * u1;
    product[j + 1] += sum1 + between * u0 + d1 * u1;
  }
  if (j === size) return;
  const row = j * n;
  let sum = 0;
  for (let k = 0; k < j; k++) {
    a[row + k] -= v[j] * w[k] + w[j] * v[k];
    sum += a[row + k] * u[k];
    product[k] += a[row + k] * u[j];
  }
  a[row + j] -= 2 * v[j] * w[j];
  product[j] += sum + a[row + j] * u[j];
}

/**
 * The product of all reflections as a matrix, n×n row-major: original = Q·tridiagonal·Qᵀ. As above, what one
 * reflection changes waits for the products that the next one needs.
 */
export function accumulateReflections(a: Float64Array, halfSquares: Float64Array, n: number): Float64Array {
  const q = new Float64Array(n * n);
  const factors = new Float64Array(n);
  let overlaps = new Float64Array(n);
  let nextOverlaps = new Float64Array(n);
  const none = new Float64Array(n);
  for (let i = 0; i <= n; i++) {
    // the reflection of row i acts on the i rows before it, all of which are finished by then but for the last one
    const u = i < n && halfSquares[i] !== 0 ? a.subarray(i * n, i * n + i) : none;
    nextOverlaps.fill(0);
    updateAndOverlap(q, n, i, factors, overlaps, u, nextOverlaps);
    [overlaps, nextOverlaps] = [nextOverlaps, overlaps];
    if (i === n) break;
    q[i * n + i] = 1;
    for (let k = 0; k < i; k++) factors[k] = u === none ? 0 : u[k] / halfSquares[i];
  }
  return q;
}

/** Q ← Q − factors·overlapsᵀ and next ← next + uᵀ·Q over the leading `size` rows and columns; two rows at once. */
function updateAndOverlap(
  q: Float64Array,
  n: number,
  size: number,
  factors: Float64Array,
  overlaps: Float64Array,
  u: Float64Array,
  next: Float64Array,
): void {
  let row = 0;
  for (; row + 2 <= size; row += 2) {
    const first = row * n;
    const second = first + n;
    const f0 = factors[row];
    const f1 = factors[row + 1];
    const u0 = u[row];
    const u1 = u[row + 1];
    for (let k = 0; k < size; k++) {
      const overlap = overlaps[k];
      const q0 = q[first + k] - f0 * overlap;
      const q1 = q[second + k] - f1 * overlap;
      q[first + k] = q0;
      q[second + k] = q1;
      next[k] += u0 * q0 + u1 * q1;
    }
  }
  if (row === size) return;
  for (let k = 0; k < size; k++) {
    q[row * n + k] -= factors[row] * overlaps[k];
    next[k] += u[row] * q[row * n + k];
  }
}
