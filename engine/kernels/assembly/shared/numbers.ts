/** Number `index` of an array. */
// @ts-ignore: decorator
@inline
export function at(array: usize, index: i32): f64 {
  return load<f64>(array + ((<usize>index) << 3));
}

// @ts-ignore: decorator
@inline
export function put(array: usize, index: i32, value: f64): void {
  store<f64>(array + ((<usize>index) << 3), value);
}
