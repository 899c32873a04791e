/*
 * Dense products in 128-bit vectors. Written in AssemblyScript: numbers are addresses of the shared memory unless
 * their type says otherwise; matrices are row-major f64.
 */

/** C += A·B with A rows×inner, B inner×columns; the strides are the lengths of the rows in numbers. */
export function addProduct(
  c: usize,
  a: usize,
  b: usize,
  rows: i32,
  inner: i32,
  columns: i32,
  cStride: i32,
  aStride: i32,
  bStride: i32,
): void {
  const cBytes = (<usize>cStride) << 3;
  const aBytes = (<usize>aStride) << 3;
  const bBytes = (<usize>bStride) << 3;
  for (let i = 0; i < rows; i++) {
    const target = c + <usize>i * cBytes;
    for (let k = 0; k < inner; k++) {
      const factor = load<f64>(a + <usize>i * aBytes + ((<usize>k) << 3));
      const factors = f64x2.splat(factor);
      const source = b + <usize>k * bBytes;
      let j = 0;
      for (; j + 2 <= columns; j += 2) {
        const place = (<usize>j) << 3;
        v128.store(
          target + place,
          f64x2.add(v128.load(target + place), f64x2.mul(factors, v128.load(source + place))),
        );
      }
      if (j < columns) {
        const place = (<usize>j) << 3;
        store<f64>(target + place, load<f64>(target + place) + factor * load<f64>(source + place));
      }
    }
  }
}
