/*
 * Rows of a matrix packed so that what belongs to one column stands side by side, a stretch. Lists of rows: addresses
 * of four bytes each; where their number is odd the last stands there twice.
 */

/**
 * packed(column) ← the signed elements of so many rows, zero up to `width`; stretches stand `stretch` bytes apart. Two
 * columns of two rows at a time.
 *
 * @param signs - f64, zero for a row that fills up a pair
 */
export function packRows(
  packed: usize,
  stretch: usize,
  width: i32,
  rows: usize,
  signs: usize,
  present: i32,
  columns: i32,
): void {
  const pairs = (present + 1) >> 1;
  const even = columns & ~1;
  for (let j = 0; j < even; j += 2) {
    const place = (<usize>j) << 3;
    const to = packed + <usize>j * stretch;
    for (let pair = 0; pair < pairs; pair++) {
      const addresses = rows + ((<usize>pair) << 3);
      const sign = signs + ((<usize>pair) << 4);
      const a = f64x2.mul(v128.load64_splat(sign), v128.load(<usize>load<u32>(addresses) + place));
      const b = f64x2.mul(v128.load64_splat(sign, 8), v128.load(<usize>load<u32>(addresses, 4) + place));
      const target = to + ((<usize>pair) << 4);
      v128.store(target, v128.shuffle<f64>(a, b, 0, 2));
      v128.store(target + stretch, v128.shuffle<f64>(a, b, 1, 3));
    }
    for (let k = 2 * pairs; k < width; k += 2) {
      const target = to + ((<usize>k) << 3);
      v128.store(target, f64x2.splat(0));
      v128.store(target + stretch, f64x2.splat(0));
    }
  }
  if (even < columns) {
    const place = (<usize>even) << 3;
    const to = packed + <usize>even * stretch;
    for (let k = 0; k < width; k++) {
      const value =
        k < present
          ? load<f64>(signs + ((<usize>k) << 3)) * load<f64>(<usize>load<u32>(rows + ((<usize>k) << 2)) + place)
          : 0;
      store<f64>(to + ((<usize>k) << 3), value);
    }
  }
}

/** rows ← packed, or rows += packed: the way back, without signs. */
// @ts-ignore: decorator
@inline
export function unpackRows(
  isAdded: bool,
  packed: usize,
  stretch: usize,
  rows: usize,
  present: i32,
  columns: i32,
): void {
  const even = columns & ~1;
  const pairs = present & ~1;
  for (let j = 0; j < even; j += 2) {
    const place = (<usize>j) << 3;
    const from = packed + <usize>j * stretch;
    for (let k = 0; k < pairs; k += 2) {
      const a = v128.load(from + ((<usize>k) << 3));
      const b = v128.load(from + stretch + ((<usize>k) << 3));
      const addresses = rows + ((<usize>k) << 2);
      put(isAdded, <usize>load<u32>(addresses) + place, v128.shuffle<f64>(a, b, 0, 2));
      put(isAdded, <usize>load<u32>(addresses, 4) + place, v128.shuffle<f64>(a, b, 1, 3));
    }
  }
  for (let k = 0; k < present; k++) {
    const row = <usize>load<u32>(rows + ((<usize>k) << 2));
    for (let j = k < pairs ? even : 0; j < columns; j++) {
      const value = load<f64>(packed + <usize>j * stretch + ((<usize>k) << 3));
      const target = row + ((<usize>j) << 3);
      store<f64>(target, isAdded ? load<f64>(target) + value : value);
    }
  }
}

// @ts-ignore: decorator
@inline
function put(isAdded: bool, target: usize, value: v128): void {
  v128.store(target, isAdded ? f64x2.add(v128.load(target), value) : value);
}
