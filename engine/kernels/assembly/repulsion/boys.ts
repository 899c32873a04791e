import { at, fma, mul, put, sub, times } from './vector';

/*
 * Boys functions of two arguments at once: the method and constants of special-functions/boys-function.ts, with a
 * table for each degree.
 */

/** e^−T and the Taylor coefficients of F_degree, 0 … 6, at 32 points a unit of T: a line of the cache a point */
const ROW_BYTES: i32 = 64;
const GRID_DENSITY: f64 = 32;
const TABLE_END: f64 = 36;
const EXP_OF_TABLE_END: f64 = 2.319522830243569e-16;
/** e^−T below 6e-32: nothing beside F_m for m ≤ 16 */
const EXPONENTIAL_END: f64 = 72;
/** 1.5·2⁵²: a number added to it is rounded to an integer, which stands in the low bits */
const ROUNDING: f64 = 6755399441055744;

/**
 * F_0 … F_degree of both arguments as a row of vectors.
 *
 * @param table - that of the degree; `inverseOdd` holds 1/(2m − 1) at m
 */
export function boysInto(degree: i32, argument: v128, table: usize, inverseOdd: usize, target: usize): void {
  const isFar = f64x2.ge(argument, f64x2.splat(TABLE_END));
  if (!v128.any_true(isFar)) {
    nearInto(degree, argument, argument, f64x2.splat(1), table, inverseOdd, target);
    return;
  }
  const isFarthest = f64x2.ge(argument, f64x2.splat(EXPONENTIAL_END));
  if (i64x2.all_true(isFarthest)) {
    farInto(degree, argument, f64x2.splat(0), isFar, target);
    return;
  }
  // the exponential is read from the same table: e^−T = e^−36 · e^−(T − 36)
  const excess = v128.and(isFar, f64x2.splat(TABLE_END));
  const reduced = v128.andnot(sub(argument, excess), isFarthest);
  const scale = v128.andnot(
    v128.bitselect(f64x2.splat(EXP_OF_TABLE_END), f64x2.splat(1), isFar),
    isFarthest,
  );
  const exponential = nearInto(degree, reduced, argument, scale, table, inverseOdd, target);
  farInto(degree, argument, exponential, isFar, target);
}

/** Taylor expansion about the nearest point of the table, then downwards; gives scale · e^−reduced. */
function nearInto(
  degree: i32,
  reduced: v128,
  argument: v128,
  scale: v128,
  table: usize,
  inverseOdd: usize,
  target: usize,
): v128 {
  const rounding = f64x2.splat(ROUNDING);
  const rounded = f64x2.add(times(GRID_DENSITY, reduced), rounding);
  const step = sub(times(1 / GRID_DENSITY, sub(rounded, rounding)), reduced);
  const row0 = table + <usize>(i32x4.extract_lane(rounded, 0) * ROW_BYTES);
  const row1 = table + <usize>(i32x4.extract_lane(rounded, 2) * ROW_BYTES);
  const step2 = mul(step, step);
  const step4 = mul(step2, step2);
  // in pairs, so that few sums wait for one another
  const low = fma(step, both(row0, row1, 16), both(row0, row1, 8));
  const middle = fma(step, both(row0, row1, 32), both(row0, row1, 24));
  const high = fma(step2, both(row0, row1, 56), fma(step, both(row0, row1, 48), both(row0, row1, 40)));
  let value = fma(step4, high, fma(step2, middle, low));
  put(target, degree, value);
  const growth = fma(
    step4,
    fma(step2, f64x2.splat(1 / 720.0), fma(step, f64x2.splat(1 / 120.0), f64x2.splat(1 / 24.0))),
    fma(step2, fma(step, f64x2.splat(1 / 6.0), f64x2.splat(0.5)), f64x2.add(step, f64x2.splat(1))),
  );
  const exponential = mul(mul(growth, scale), both(row0, row1, 0));
  const twice = f64x2.add(argument, argument);
  for (let order = degree; order > 0; order--) {
    const inverse = v128.load64_splat(inverseOdd + ((<usize>order) << 3));
    value = fma(mul(twice, inverse), value, mul(exponential, inverse));
    put(target, order - 1, value);
  }
  return exponential;
}

/** F_0 = ½√(π/T), then upwards; only where `isFar`. */
function farInto(degree: i32, argument: v128, exponential: v128, isFar: v128, target: usize): void {
  const inverse = f64x2.div(f64x2.splat(0.5), argument);
  let value = f64x2.sqrt(times(0.5 * Math.PI, inverse));
  let odd: f64 = 1;
  for (let order = 0; ; order++) {
    put(target, order, v128.bitselect(value, at(target, order), isFar));
    if (order === degree) return;
    value = mul(sub(times(odd, value), exponential), inverse);
    odd += 2;
  }
}

/** one number from each row */
function both(row0: usize, row1: usize, place: usize): v128 {
  return v128.load64_lane(row1 + place, v128.load64_zero(row0 + place), 1);
}
