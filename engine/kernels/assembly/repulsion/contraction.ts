import { add, at, fma, mul, put } from './vector';

/*
 * Sums over primitives, two lanes at once. Blocks of four sums stay in registers while the primitives pass.
 */

/**
 * target[n] (+)= Σ_k factor[k] · source[k][n] for n < length: rows of vectors.
 *
 * @param factorStep - bytes from one factor (a vector) to the next, `sourceStep` from one row to the next
 * @param isFirst - whether the sums begin here or go on
 */
export function contractInto(
  factor: usize,
  factorStep: usize,
  source: usize,
  sourceStep: usize,
  count: i32,
  target: usize,
  length: i32,
  isFirst: bool,
): void {
  const zero = f64x2.splat(0);
  let n = 0;
  for (; n + 4 <= length; n += 4) {
    const place = (<usize>n) << 4;
    let f = factor;
    let row = source + place;
    let s0 = isFirst ? zero : at(target, n);
    let s1 = isFirst ? zero : at(target, n + 1);
    let s2 = isFirst ? zero : at(target, n + 2);
    let s3 = isFirst ? zero : at(target, n + 3);
    for (let k = 0; k < count; k++) {
      const value = v128.load(f);
      s0 = fma(value, v128.load(row), s0);
      s1 = fma(value, v128.load(row, 16), s1);
      s2 = fma(value, v128.load(row, 32), s2);
      s3 = fma(value, v128.load(row, 48), s3);
      f += factorStep;
      row += sourceStep;
    }
    put(target, n, s0);
    put(target, n + 1, s1);
    put(target, n + 2, s2);
    put(target, n + 3, s3);
  }
  for (; n < length; n++) {
    let f = factor;
    let row = source + ((<usize>n) << 4);
    let sum = isFirst ? zero : at(target, n);
    for (let k = 0; k < count; k++) {
      sum = fma(v128.load(f), v128.load(row), sum);
      f += factorStep;
      row += sourceStep;
    }
    put(target, n, sum);
  }
}

/** {@link contractInto} with two neighbouring factors into two targets, so that the source is read once for both. */
export function contractTwoInto(
  factor: usize,
  factorStep: usize,
  source: usize,
  sourceStep: usize,
  count: i32,
  first: usize,
  second: usize,
  length: i32,
  isFirst: bool,
): void {
  const zero = f64x2.splat(0);
  let n = 0;
  for (; n + 3 <= length; n += 3) {
    const place = (<usize>n) << 4;
    let f = factor;
    let row = source + place;
    let s0 = isFirst ? zero : at(first, n);
    let s1 = isFirst ? zero : at(first, n + 1);
    let s2 = isFirst ? zero : at(first, n + 2);
    let t0 = isFirst ? zero : at(second, n);
    let t1 = isFirst ? zero : at(second, n + 1);
    let t2 = isFirst ? zero : at(second, n + 2);
    for (let k = 0; k < count; k++) {
      const one = v128.load(f);
      const other = v128.load(f, 16);
      const v0 = v128.load(row);
      const v1 = v128.load(row, 16);
      const v2 = v128.load(row, 32);
      s0 = fma(one, v0, s0);
      s1 = fma(one, v1, s1);
      s2 = fma(one, v2, s2);
      t0 = fma(other, v0, t0);
      t1 = fma(other, v1, t1);
      t2 = fma(other, v2, t2);
      f += factorStep;
      row += sourceStep;
    }
    put(first, n, s0);
    put(first, n + 1, s1);
    put(first, n + 2, s2);
    put(second, n, t0);
    put(second, n + 1, t1);
    put(second, n + 2, t2);
  }
  for (; n < length; n++) {
    let f = factor;
    let row = source + ((<usize>n) << 4);
    let s = isFirst ? zero : at(first, n);
    let t = isFirst ? zero : at(second, n);
    for (let k = 0; k < count; k++) {
      const value = v128.load(row);
      s = fma(v128.load(f), value, s);
      t = fma(v128.load(f, 16), value, t);
      f += factorStep;
      row += sourceStep;
    }
    put(first, n, s);
    put(second, n, t);
  }
}

/** Adds the two lanes of each vector. */
export function joinLanes(source: usize, count: i32, target: usize): void {
  let n = 0;
  for (; n + 2 <= count; n += 2) {
    const a = at(source, n);
    const b = at(source, n + 1);
    // (a0 + a1, b0 + b1)
    v128.store(target, add(v128.shuffle<i64>(a, b, 0, 2), v128.shuffle<i64>(a, b, 1, 3)));
    target += 16;
  }
  if (n < count) {
    const a = at(source, n);
    store<f64>(target, f64x2.extract_lane(a, 0) + f64x2.extract_lane(a, 1));
  }
}

/**
 * Sparse times dense, target = V · source: rows of numbers of the given width.
 *
 * @param rowStart - first entry of each row of V (i32); `columns` (i32) and `values` (f64) of the entries
 */
export function sparseProductInto(
  rows: i32,
  rowStart: usize,
  columns: usize,
  values: usize,
  source: usize,
  width: i32,
  target: usize,
): void {
  const rowBytes = (<usize>width) << 3;
  for (let row = 0; row < rows; row++) {
    const from = load<i32>(rowStart + ((<usize>row) << 2));
    const end = load<i32>(rowStart + ((<usize>row) << 2), 4);
    const out = target + <usize>row * rowBytes;
    if (width >= 8) {
      // the last block may overlap the one before
      for (let n = 0; n < width; n += 8) {
        const place = (<usize>(n + 8 <= width ? n : width - 8)) << 3;
        let s0 = f64x2.splat(0);
        let s1 = f64x2.splat(0);
        let s2 = f64x2.splat(0);
        let s3 = f64x2.splat(0);
        for (let entry = from; entry < end; entry++) {
          const value = v128.load64_splat(values + ((<usize>entry) << 3));
          const line = source + place + <usize>load<u32>(columns + ((<usize>entry) << 2)) * rowBytes;
          s0 = fma(value, v128.load(line), s0);
          s1 = fma(value, v128.load(line, 16), s1);
          s2 = fma(value, v128.load(line, 32), s2);
          s3 = fma(value, v128.load(line, 48), s3);
        }
        v128.store(out + place, s0);
        v128.store(out + place, s1, 16);
        v128.store(out + place, s2, 32);
        v128.store(out + place, s3, 48);
      }
      continue;
    }
    let n = 0;
    for (; n + 2 <= width; n += 2) {
      const place = (<usize>n) << 3;
      let sum = f64x2.splat(0);
      for (let entry = from; entry < end; entry++) {
        const value = v128.load64_splat(values + ((<usize>entry) << 3));
        const line = source + place + <usize>load<u32>(columns + ((<usize>entry) << 2)) * rowBytes;
        sum = fma(value, v128.load(line), sum);
      }
      v128.store(out + place, sum);
    }
    if (n < width) {
      const place = (<usize>n) << 3;
      let sum: f64 = 0;
      for (let entry = from; entry < end; entry++) {
        const line = source + place + <usize>load<u32>(columns + ((<usize>entry) << 2)) * rowBytes;
        sum += load<f64>(values + ((<usize>entry) << 3)) * load<f64>(line);
      }
      store<f64>(out + place, sum);
    }
  }
}
