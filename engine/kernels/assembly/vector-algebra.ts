/*
 * Combinations and scalar products of many long vectors, in one pass through memory for all of them. Cut into tasks of
 * TASK elements each, whatever the number of threads: so every sum is built up in the same order.
 */

/** Elements of one task. */
const TASK: i32 = 16384;
/** Elements that are kept in the fastest cache while the vectors pass by. */
const CHUNK: i32 = 1024;

/** What a pass works on; every field four bytes. */
@unmanaged
class Pass {
  dimension: i32;
  /** number of vectors read */
  count: i32;
  /** u32[count]: their addresses */
  vectors: usize;
  /** f64[count], or, of a rotation, f64[count][columns] */
  factors: usize;
  /** vector written; of scalar products, the one that all others meet */
  target: usize;
  /** of a task, f64[count] scalar products, or f64[1] squared length */
  sums: usize;
  /** f64[1]: what of the target is kept; where it is zero the target is not read */
  own: usize;
  /** of a rotation: vectors written, the first ones of those read */
  columns: i32;
  /** of a rotation and one thread: f64[count][CHUNK] */
  scratch: usize;
}

// @ts-ignore: decorator
@inline
function vectorAt(pass: Pass, index: i32): usize {
  return <usize>load<u32>(pass.vectors + ((<usize>index) << 2));
}

// @ts-ignore: decorator
@inline
function numberAt(numbers: usize, index: i32): f64 {
  return load<f64>(numbers + ((<usize>index) << 3));
}

/** target ← own·target + Σ factor·vector, and its squared length. */
export function combineTask(address: usize, task: i32, thread: i32): void {
  const pass = changetype<Pass>(address);
  const own = load<f64>(pass.own);
  const end = min((task + 1) * TASK, pass.dimension);
  let square: f64 = 0;
  for (let start = task * TASK; start < end; start += CHUNK) {
    const length = min(CHUNK, end - start);
    const place = (<usize>start) << 3;
    const target = pass.target + place;
    scaleChunk(target, own, length);
    let i = 0;
    for (; i + 4 <= pass.count; i += 4) {
      addFour(
        target,
        vectorAt(pass, i) + place,
        vectorAt(pass, i + 1) + place,
        vectorAt(pass, i + 2) + place,
        vectorAt(pass, i + 3) + place,
        pass.factors + ((<usize>i) << 3),
        8,
        length,
      );
    }
    for (; i < pass.count; i++) addOne(target, vectorAt(pass, i) + place, numberAt(pass.factors, i), length);
    square += dotChunk(target, target, length);
  }
  store<f64>(pass.sums + ((<usize>task) << 3), square);
}

/** Scalar products of all vectors with the target. */
export function dotTask(address: usize, task: i32, thread: i32): void {
  const pass = changetype<Pass>(address);
  const end = min((task + 1) * TASK, pass.dimension);
  const sums = pass.sums + ((<usize>(task * pass.count)) << 3);
  for (let i = 0; i < pass.count; i++) store<f64>(sums + ((<usize>i) << 3), 0);
  for (let start = task * TASK; start < end; start += CHUNK) {
    const length = min(CHUNK, end - start);
    const place = (<usize>start) << 3;
    const target = pass.target + place;
    let i = 0;
    for (; i + 4 <= pass.count; i += 4) {
      dotFour(
        sums + ((<usize>i) << 3),
        target,
        vectorAt(pass, i) + place,
        vectorAt(pass, i + 1) + place,
        vectorAt(pass, i + 2) + place,
        vectorAt(pass, i + 3) + place,
        length,
      );
    }
    for (; i < pass.count; i++) {
      const sum = sums + ((<usize>i) << 3);
      store<f64>(sum, load<f64>(sum) + dotChunk(target, vectorAt(pass, i) + place, length));
    }
  }
}

/** The first `columns` vectors become combinations of all. */
export function rotateTask(address: usize, task: i32, thread: i32): void {
  const pass = changetype<Pass>(address);
  const count = pass.count;
  const columns = pass.columns;
  const end = min((task + 1) * TASK, pass.dimension);
  const row: usize = (<usize>CHUNK) << 3;
  const old = pass.scratch + <usize>(thread * count) * row;
  const stride = (<usize>columns) << 3;
  for (let start = task * TASK; start < end; start += CHUNK) {
    const length = min(CHUNK, end - start);
    const place = (<usize>start) << 3;
    for (let i = 0; i < count; i++) {
      memory.copy(old + <usize>i * row, vectorAt(pass, i) + place, (<usize>length) << 3);
    }
    for (let k = 0; k < columns; k++) {
      const target = vectorAt(pass, k) + place;
      const factors = pass.factors + ((<usize>k) << 3);
      scaleChunk(target, 0, length);
      let i = 0;
      for (; i + 4 <= count; i += 4) {
        const from = old + <usize>i * row;
        addFour(target, from, from + row, from + 2 * row, from + 3 * row, factors + <usize>i * stride, stride, length);
      }
      for (; i < count; i++) {
        addOne(target, old + <usize>i * row, load<f64>(factors + <usize>i * stride), length);
      }
    }
  }
}

/** The factors stand so many bytes apart. */
function addFour(
  target: usize,
  a: usize,
  b: usize,
  c: usize,
  d: usize,
  factors: usize,
  stride: usize,
  length: i32,
): void {
  const fa = v128.load64_splat(factors);
  const fb = v128.load64_splat(factors + stride);
  const fc = v128.load64_splat(factors + 2 * stride);
  const fd = v128.load64_splat(factors + 3 * stride);
  const even = (<usize>(length & ~1)) << 3;
  for (let at: usize = 0; at < even; at += 16) {
    const ab = f64x2.add(f64x2.mul(fa, v128.load(a + at)), f64x2.mul(fb, v128.load(b + at)));
    const cd = f64x2.add(f64x2.mul(fc, v128.load(c + at)), f64x2.mul(fd, v128.load(d + at)));
    v128.store(target + at, f64x2.add(v128.load(target + at), f64x2.add(ab, cd)));
  }
  if (length & 1) {
    const ab = load<f64>(factors) * load<f64>(a + even) + load<f64>(factors + stride) * load<f64>(b + even);
    const cd =
      load<f64>(factors + 2 * stride) * load<f64>(c + even) + load<f64>(factors + 3 * stride) * load<f64>(d + even);
    store<f64>(target + even, load<f64>(target + even) + (ab + cd));
  }
}

function addOne(target: usize, vector: usize, factor: f64, length: i32): void {
  const factors = f64x2.splat(factor);
  const even = (<usize>(length & ~1)) << 3;
  for (let at: usize = 0; at < even; at += 16) {
    v128.store(target + at, f64x2.add(v128.load(target + at), f64x2.mul(factors, v128.load(vector + at))));
  }
  if (length & 1) store<f64>(target + even, load<f64>(target + even) + factor * load<f64>(vector + even));
}

function scaleChunk(target: usize, factor: f64, length: i32): void {
  if (factor == 1) return;
  const bytes = (<usize>length) << 3;
  if (factor == 0) {
    memory.fill(target, 0, bytes);
    return;
  }
  for (let at: usize = 0; at < bytes; at += 8) store<f64>(target + at, factor * load<f64>(target + at));
}

/** Adds to four sums. */
function dotFour(sums: usize, target: usize, a: usize, b: usize, c: usize, d: usize, length: i32): void {
  let sa = f64x2.splat(0);
  let sb = sa;
  let sc = sa;
  let sd = sa;
  const even = (<usize>(length & ~1)) << 3;
  for (let at: usize = 0; at < even; at += 16) {
    const value = v128.load(target + at);
    sa = f64x2.add(sa, f64x2.mul(value, v128.load(a + at)));
    sb = f64x2.add(sb, f64x2.mul(value, v128.load(b + at)));
    sc = f64x2.add(sc, f64x2.mul(value, v128.load(c + at)));
    sd = f64x2.add(sd, f64x2.mul(value, v128.load(d + at)));
  }
  let ra = sumOf(sa);
  let rb = sumOf(sb);
  let rc = sumOf(sc);
  let rd = sumOf(sd);
  if (length & 1) {
    const value = load<f64>(target + even);
    ra += value * load<f64>(a + even);
    rb += value * load<f64>(b + even);
    rc += value * load<f64>(c + even);
    rd += value * load<f64>(d + even);
  }
  store<f64>(sums, load<f64>(sums) + ra);
  store<f64>(sums, load<f64>(sums, 8) + rb, 8);
  store<f64>(sums, load<f64>(sums, 16) + rc, 16);
  store<f64>(sums, load<f64>(sums, 24) + rd, 24);
}

function dotChunk(a: usize, b: usize, length: i32): f64 {
  let even = f64x2.splat(0);
  let odd = even;
  const whole = (<usize>(length & ~3)) << 3;
  for (let at: usize = 0; at < whole; at += 32) {
    even = f64x2.add(even, f64x2.mul(v128.load(a + at), v128.load(b + at)));
    odd = f64x2.add(odd, f64x2.mul(v128.load(a + at, 16), v128.load(b + at, 16)));
  }
  let sum = sumOf(f64x2.add(even, odd));
  const end = (<usize>length) << 3;
  for (let at = whole; at < end; at += 8) sum += load<f64>(a + at) * load<f64>(b + at);
  return sum;
}

// @ts-ignore: decorator
@inline
function sumOf(pair: v128): f64 {
  return f64x2.extract_lane(pair, 0) + f64x2.extract_lane(pair, 1);
}
