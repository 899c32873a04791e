/* Arithmetic of two numbers side by side, under names short enough for formulas. */

export function add(a: v128, b: v128): v128 {
  return f64x2.add(a, b);
}

export function sub(a: v128, b: v128): v128 {
  return f64x2.sub(a, b);
}

export function mul(a: v128, b: v128): v128 {
  return f64x2.mul(a, b);
}

/** a·b + c */
export function fma(a: v128, b: v128, c: v128): v128 {
  return f64x2.add(f64x2.mul(a, b), c);
}

/** factor·a + c for a plain number */
export function times(factor: f64, a: v128): v128 {
  return f64x2.mul(f64x2.splat(factor), a);
}

/** the vector of the given place in a row of vectors */
export function at(row: usize, index: i32): v128 {
  return v128.load(row + ((<usize>index) << 4));
}

export function put(row: usize, index: i32, value: v128): void {
  v128.store(row + ((<usize>index) << 4), value);
}
