/*
 * Eigenvalues and eigenvectors of D + ρ·z·zᵀ, D diagonal. Numbers are addresses unless their type says otherwise.
 *
 * Sources: roots of the secular equation by rational interpolation, J. R. Bunch, C. P. Nielsen, D. C. Sorensen, Numer.
 * Math. 31, 31 (1978), and R.-C. Li, "Solving secular equations stably and efficiently" (1993), the "middle way";
 * vectors orthogonal to working precision however close the roots, M. Gu, S. C. Eisenstat, SIAM J. Matrix Anal.
 * Appl. 15, 1266 (1994).
 */
import { at, put } from './shared/numbers';

/** Two to five are usual. */
const MOST_STEPS: i32 = 100;

/**
 * All roots of 1 + ρ·Σ z(i)²/(d(i) − λ) = 0; root j lies between d(j) and d(j + 1).
 *
 * @param work - 2 numbers
 * @param d - k rising numbers, no two equal
 * @param z - none of them zero
 * @param values - k
 * @param differences - k×k: d(i) − λ(j) in row j, to full relative precision
 * @returns −1, or the number of a root that was not found
 */
export function solveSecular(
  work: usize,
  d: usize,
  z: usize,
  rho: f64,
  k: i32,
  values: usize,
  differences: usize,
): i32 {
  for (let j = 0; j < k; j++) {
    const isLast = j === k - 1;
    let origin = j;
    // the root lies between these two distances from the origin
    let low: f64 = 0;
    let high: f64;
    let tau: f64;
    const weight = rho * at(z, j) * at(z, j);
    if (isLast) {
      let square: f64 = 0;
      for (let i = 0; i < k; i++) square += at(z, i) * at(z, i);
      high = rho * square;
      sumInto(work, d, z, 0, j, at(d, j), high);
      tau = weight / (1 + rho * load<f64>(work));
    } else {
      const gap = at(d, j + 1) - at(d, j);
      const half = gap / 2;
      sumInto(work, d, z, 0, k, at(d, j), half);
      const f = 1 + rho * load<f64>(work);
      const nextWeight = rho * at(z, j + 1) * at(z, j + 1);
      // the two nearest poles as they are, all else as it is in the middle
      const c = f + weight / half - nextWeight / half;
      if (f >= 0) {
        high = half;
        tau = smallerRoot(c * gap + weight + nextWeight, weight * gap, c);
      } else {
        origin = j + 1;
        low = -half;
        high = 0;
        tau = smallerRoot(weight + nextWeight - c * gap, -nextWeight * gap, c);
      }
    }
    if (!(tau > low && tau < high)) tau = (low + high) / 2;

    const base = at(d, origin);
    let step = 0;
    for (; step < MOST_STEPS; step++) {
      sumInto(work, d, z, 0, j + 1, base, tau);
      const left = rho * load<f64>(work);
      const leftSlope = rho * load<f64>(work, 8);
      sumInto(work, d, z, j + 1, k, base, tau);
      const right = rho * load<f64>(work);
      const rightSlope = rho * load<f64>(work, 8);
      const f = 1 + left + right;
      const slope = leftSlope + rightSlope;
      // what rounding may have done to f
      const bound = f64.EPSILON * (8 * (1 + right - left) + Math.abs(tau) * slope);
      if (Math.abs(f) <= bound) break;
      if (f < 0) low = tau;
      else high = tau;
      const before = at(d, j) - base - tau;
      let change: f64;
      if (isLast) {
        change = before + (before * before * leftSlope) / (f - before * leftSlope);
      } else {
        const behind = at(d, j + 1) - base - tau;
        const c = f - before * leftSlope - behind * rightSlope;
        change = smallerRoot((before + behind) * f - before * behind * slope, before * behind * f, c);
      }
      if (!(f * change < 0)) change = -f / slope;
      let next = tau + change;
      if (!(next > low && next < high)) next = (low + high) / 2;
      // no number lies between the bounds
      if (next === tau || next === low || next === high) break;
      tau = next;
    }
    if (step === MOST_STEPS) return j;
    put(values, j, base + tau);
    const row = differences + (<usize>j * <usize>k << 3);
    for (let i = 0; i < k; i++) put(row, i, at(d, i) - base - tau);
  }
  return -1;
}

/**
 * Eigenvectors of length 1 in the place of the differences.
 *
 * @param work - 2k numbers
 * @param position - k places of 32 bits: element i of every vector goes to position(i)
 */
export function secularVectors(
  work: usize,
  d: usize,
  z: usize,
  k: i32,
  position: usize,
  differences: usize,
): void {
  // the vector z of which the roots found are the exact ones
  const exact = work;
  const vector = work + ((<usize>k) << 3);
  for (let i = 0; i < k; i++) put(exact, i, 1);
  for (let j = 0; j < k; j++) {
    const row = differences + (<usize>j * <usize>k << 3);
    const own = at(exact, j) * at(row, j);
    const dj = f64x2.splat(at(d, j));
    let i = 0;
    for (; i + 2 <= k; i += 2) {
      const place = (<usize>i) << 3;
      const ratio = f64x2.div(v128.load(row + place), f64x2.sub(v128.load(d + place), dj));
      v128.store(exact + place, f64x2.mul(v128.load(exact + place), ratio));
    }
    if (i < k) put(exact, i, (at(exact, i) * at(row, i)) / (at(d, i) - at(d, j)));
    put(exact, j, own);
  }
  for (let i = 0; i < k; i++) {
    const size = Math.sqrt(Math.abs(at(exact, i)));
    put(exact, i, at(z, i) < 0 ? -size : size);
  }
  for (let j = 0; j < k; j++) {
    const row = differences + (<usize>j * <usize>k << 3);
    let square: f64 = 0;
    for (let i = 0; i < k; i++) {
      const element = at(exact, i) / at(row, i);
      put(vector, i, element);
      square += element * element;
    }
    const scale = 1 / Math.sqrt(square);
    for (let i = 0; i < k; i++) {
      put(row, load<i32>(position + ((<usize>i) << 2)), at(vector, i) * scale);
    }
  }
}

/** Σ z(i)²/(d(i) − origin − τ) for first ≤ i < end, and its derivative by τ. */
function sumInto(target: usize, d: usize, z: usize, first: i32, end: i32, origin: f64, tau: f64): void {
  const origins = f64x2.splat(origin);
  const taus = f64x2.splat(tau);
  let sums = f64x2.splat(0);
  let slopes = sums;
  let i = first;
  for (; i + 2 <= end; i += 2) {
    const place = (<usize>i) << 3;
    const zi = v128.load(z + place);
    const term = f64x2.div(zi, f64x2.sub(f64x2.sub(v128.load(d + place), origins), taus));
    sums = f64x2.add(sums, f64x2.mul(zi, term));
    slopes = f64x2.add(slopes, f64x2.mul(term, term));
  }
  let sum = f64x2.extract_lane(sums, 0) + f64x2.extract_lane(sums, 1);
  let slope = f64x2.extract_lane(slopes, 0) + f64x2.extract_lane(slopes, 1);
  if (i < end) {
    const term = at(z, i) / (at(d, i) - origin - tau);
    sum += at(z, i) * term;
    slope += term * term;
  }
  store<f64>(target, sum);
  store<f64>(target, slope, 8);
}

/** The root of c·x² − a·x + b that is smaller in size, or, for a ≤ 0, the one of the other branch; no cancellation. */
// @ts-ignore: decorator
@inline
function smallerRoot(a: f64, b: f64, c: f64): f64 {
  const root = Math.sqrt(Math.abs(a * a - 4 * b * c));
  return a > 0 ? (2 * b) / (a + root) : (a - root) / (2 * c);
}
