import { at, fma, mul, put, sub, times } from './vector';

/*
 * Boys functions of two arguments at once: the method, table and constants of special-functions/boys-function.ts.
 */

/** e^−T, F_0 … F_26 at 32 points a unit of T */
const ROW_BYTES: i32 = 28 << 3;
const GRID_DENSITY: f64 = 32;
const TABLE_END: f64 = 36;
const EXP_OF_TABLE_END: f64 = 2.319522830243569e-16;
/** e^−T below 6e-32: nothing beside F_m for m ≤ 16 */
const EXPONENTIAL_END: f64 = 72;
/** 1.5·2⁵²: a number added to it is rounded to an integer, which stands in the low bits */
const ROUNDING: f64 = 6755399441055744;

/** F_0 … F_degree of both arguments as a row of vectors. @param inverseOdd - 1/(2m − 1) at m */
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
  const first0 = row0 + 8 + ((<usize>degree) << 3);
  const first1 = row1 + 8 + ((<usize>degree) << 3);
  const half = times(1 / 2.0, step);
  const third = times(1 / 3.0, step);
  const quarter = times(1 / 4.0, step);
  const fifth = times(1 / 5.0, step);
  const sixth = times(1 / 6.0, step);
  let value = fma(sixth, both(first0, first1, 48), both(first0, first1, 40));
  value = fma(fifth, value, both(first0, first1, 32));
  value = fma(quarter, value, both(first0, first1, 24));
  value = fma(third, value, both(first0, first1, 16));
  value = fma(half, value, both(first0, first1, 8));
  value = fma(step, value, both(first0, first1, 0));
  put(target, degree, value);
  if (degree === 0) return step;
  const one = f64x2.splat(1);
  let exponential = fma(times(1 / 7.0, step), one, one);
  exponential = fma(sixth, exponential, one);
  exponential = fma(fifth, exponential, one);
  exponential = fma(quarter, exponential, one);
  exponential = fma(third, exponential, one);
  exponential = fma(half, exponential, one);
  exponential = fma(step, exponential, one);
  exponential = mul(mul(exponential, scale), both(row0, row1, 0));
  const twice = f64x2.add(argument, argument);
  for (let order = degree; order > 0; order--) {
    value = mul(fma(twice, value, exponential), v128.load64_splat(inverseOdd + ((<usize>order) << 3)));
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
