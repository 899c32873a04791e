/*
 * Householder's reduction in 128-bit vectors, as in engine/linear-algebra/tridiagonalise.ts, which says how and why.
 * Numbers are addresses unless their type says otherwise; a is n×n row-major, its lower triangle is read, and row i
 * becomes the vector of the reflection that it defines.
 */
import { at, put } from './shared/numbers';

/** The squared length of a row that is as good as zero. */
const NOTHING: f64 = f64.EPSILON * f64.EPSILON * f64.EPSILON * f64.EPSILON;

/** @param work - 3n numbers */
export function tridiagonalise(
  work: usize,
  a: usize,
  n: i32,
  diagonal: usize,
  offDiagonal: usize,
  halfSquares: usize,
): void {
  const bytes = (<usize>n) << 3;
  const v = work;
  const w = v + bytes;
  const product = w + bytes;
  memory.fill(v, 0, 2 * bytes);
  memory.fill(offDiagonal, 0, bytes);
  memory.fill(halfSquares, 0, bytes);
  for (let i = n - 1; i >= 0; i--) {
    const row = a + <usize>i * bytes;
    const vi = at(v, i);
    const wi = at(w, i);
    for (let k = 0; k <= i; k++) put(row, k, at(row, k) - (vi * at(w, k) + wi * at(v, k)));
    put(diagonal, i, at(row, i));
    if (i === 0) break;
    const half = reflect(row, offDiagonal, i);
    put(halfSquares, i, half);
    memory.fill(product, 0, (<usize>i) << 3);
    updateAndMultiply(a, bytes, i, v, w, row, product);
    if (half === 0) {
      memory.fill(v, 0, 2 * bytes);
      continue;
    }
    const inverse = 1 / half;
    let overlap: f64 = 0;
    for (let k = 0; k < i; k++) {
      const scaled = at(product, k) * inverse;
      put(product, k, scaled);
      overlap += scaled * at(row, k);
    }
    const shift = overlap / (2 * half);
    for (let k = 0; k < i; k++) {
      const u = at(row, k);
      put(v, k, u);
      put(w, k, at(product, k) - shift * u);
    }
  }
}

function reflect(u: usize, offDiagonal: usize, i: i32): f64 {
  const last = i - 1;
  let rest: f64 = 0;
  for (let k = 0; k < last; k++) rest += at(u, k) * at(u, k);
  const element = at(u, last);
  const square = rest + element * element;
  if (square < NOTHING) {
    put(offDiagonal, i, 0);
    return 0;
  }
  put(offDiagonal, i, element);
  if (rest === 0) return 0;
  const length = Math.sqrt(square);
  const target = element >= 0 ? -length : length;
  put(offDiagonal, i, target);
  put(u, last, element - target);
  return square - element * target;
}

/** A ← A − v·wᵀ − w·vᵀ and product ← product + A·u over the leading `size` rows; two rows and columns at once. */
function updateAndMultiply(
  a: usize,
  bytes: usize,
  size: i32,
  v: usize,
  w: usize,
  u: usize,
  product: usize,
): void {
  let j = 0;
  for (; j + 2 <= size; j += 2) {
    const first = a + <usize>j * bytes;
    const second = first + bytes;
    const v0 = v128.load64_splat(v + ((<usize>j) << 3));
    const v1 = v128.load64_splat(v + ((<usize>j) << 3), 8);
    const w0 = v128.load64_splat(w + ((<usize>j) << 3));
    const w1 = v128.load64_splat(w + ((<usize>j) << 3), 8);
    const u0 = v128.load64_splat(u + ((<usize>j) << 3));
    const u1 = v128.load64_splat(u + ((<usize>j) << 3), 8);
    let sums0 = f64x2.splat(0);
    let sums1 = sums0;
    const end = (<usize>j) << 3;
    for (let k: usize = 0; k < end; k += 16) {
      const vk = v128.load(v + k);
      const wk = v128.load(w + k);
      const uk = v128.load(u + k);
      let a0 = v128.load(first + k);
      let a1 = v128.load(second + k);
      a0 = f64x2.sub(f64x2.sub(a0, f64x2.mul(v0, wk)), f64x2.mul(w0, vk));
      a1 = f64x2.sub(f64x2.sub(a1, f64x2.mul(v1, wk)), f64x2.mul(w1, vk));
      v128.store(first + k, a0);
      v128.store(second + k, a1);
      sums0 = f64x2.add(sums0, f64x2.mul(a0, uk));
      sums1 = f64x2.add(sums1, f64x2.mul(a1, uk));
      const grown = f64x2.add(f64x2.mul(a0, u0), f64x2.mul(a1, u1));
      v128.store(product + k, f64x2.add(v128.load(product + k), grown));
    }
    const sum0 = f64x2.extract_lane(sums0, 0) + f64x2.extract_lane(sums0, 1);
    const sum1 = f64x2.extract_lane(sums1, 0) + f64x2.extract_lane(sums1, 1);
    const d0 = at(first, j) - 2 * at(v, j) * at(w, j);
    const between = at(second, j) - at(v, j + 1) * at(w, j) - at(w, j + 1) * at(v, j);
    const d1 = at(second, j + 1) - 2 * at(v, j + 1) * at(w, j + 1);
    put(first, j, d0);
    put(second, j, between);
    put(second, j + 1, d1);
    put(product, j, at(product, j) + sum0 + d0 * at(u, j) + between * at(u, j + 1));
    put(product, j + 1, at(product, j + 1) + sum1 + between * at(u, j) + d1 * at(u, j + 1));
  }
  if (j === size) return;
  const row = a + <usize>j * bytes;
  let sum: f64 = 0;
  for (let k = 0; k < j; k++) {
    const element = at(row, k) - at(v, j) * at(w, k) - at(w, j) * at(v, k);
    put(row, k, element);
    sum += element * at(u, k);
    put(product, k, at(product, k) + element * at(u, j));
  }
  const element = at(row, j) - 2 * at(v, j) * at(w, j);
  put(row, j, element);
  put(product, j, at(product, j) + sum + element * at(u, j));
}
