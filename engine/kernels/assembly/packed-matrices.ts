/*
 * Many symmetric matrices side by side: element (i ≥ j) of all of them in one run of `width` numbers, the runs in
 * the order of a packed lower triangle. Numbers are addresses unless their type says otherwise.
 */

/** One row of every matrix: `target` n×width, row-major. */
export function copyMatrixRow(target: usize, packed: usize, row: i32, n: i32, width: i32): void {
  const bytes = (<usize>width) << 3;
  let source = packed + <usize>((row * (row + 1)) >> 1) * bytes;
  for (let column = 0; column < n; column++) {
    copy(target, source, width);
    target += bytes;
    // along the row up to the diagonal, then down the column
    source += column < row ? bytes : <usize>(column + 1) * bytes;
  }
}

// @ts-ignore: decorator
@inline
function copy(target: usize, source: usize, length: i32): void {
  let k = 0;
  for (; k + 2 <= length; k += 2) {
    const at = (<usize>k) << 3;
    v128.store(target + at, v128.load(source + at));
  }
  if (k < length) {
    const at = (<usize>k) << 3;
    store<f64>(target + at, load<f64>(source + at));
  }
}
