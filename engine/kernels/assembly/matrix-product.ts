/*
 * Dense products in 128-bit vectors. Written in AssemblyScript: numbers are addresses of the shared memory unless
 * their type says otherwise; matrices are f64.
 *
 * Every product goes by tiles of 4×4 elements that stay in registers. Strips of four rows of A and four columns of B
 * are first copied side by side, so that a tile reads forwards whatever the strides of the matrices; blocks of the
 * copies fit into the caches. Elements of A are copied twice, because to double one on loading takes an instruction
 * more for its address. After K. Goto, R. A. van de Geijn, ACM Trans. Math. Softw. 34, 12 (2008).
 */

const TILE: i32 = 4;
/** inner length of a block: a strip of A and one of B, 18 KiB, stay in the first cache */
const INNER_BLOCK: i32 = 192;
/** rows of A in a block: 288 KiB, in the second cache */
const ROW_BLOCK: i32 = 96;
const COLUMN_BLOCK: i32 = 384;

/** Bytes of `work` that `productInto` needs. */
export function productWorkBytes(): i32 {
  return ((2 * ROW_BLOCK + COLUMN_BLOCK) * INNER_BLOCK + TILE * TILE) << 3;
}

/**
 * C = factor·A·B, or C += factor·A·B, with A rows×inner and B inner×columns, C row-major. Element (i, k) of A stands at
 * i·aRow + k·aInner numbers, element (k, j) of B at k·bInner + j·bColumn: transposed factors are a matter of strides.
 */
export function productInto(
  work: usize,
  isAdded: bool,
  factor: f64,
  c: usize,
  a: usize,
  b: usize,
  rows: i32,
  inner: i32,
  columns: i32,
  cRow: i32,
  aRow: i32,
  aInner: i32,
  bInner: i32,
  bColumn: i32,
): void {
  if (inner === 0 && !isAdded) {
    for (let i = 0; i < rows; i++) memory.fill(place(c, i, cRow, 0, 1), 0, (<usize>columns) << 3);
  }
  const packedA = work + ((TILE * TILE) << 3);
  const packedB = packedA + (<usize>(2 * ROW_BLOCK * INNER_BLOCK) << 3);
  for (let j = 0; j < columns; j += COLUMN_BLOCK) {
    const width = min(COLUMN_BLOCK, columns - j);
    for (let k = 0; k < inner; k += INNER_BLOCK) {
      const depth = min(INNER_BLOCK, inner - k);
      packRight(
        packedB,
        place(b, k, bInner, j, bColumn),
        width,
        depth,
        (<usize>bColumn) << 3,
        (<usize>bInner) << 3,
      );
      for (let i = 0; i < rows; i += ROW_BLOCK) {
        const height = min(ROW_BLOCK, rows - i);
        packLeft(
          packedA,
          place(a, i, aRow, k, aInner),
          height,
          depth,
          (<usize>aRow) << 3,
          (<usize>aInner) << 3,
          factor,
        );
        tiles(
          work,
          isAdded || k > 0,
          place(c, i, cRow, j, 1),
          packedA,
          packedB,
          height,
          depth,
          width,
          (<usize>cRow) << 3,
        );
      }
    }
  }
}

// @ts-ignore: decorator
@inline
function place(matrix: usize, i: i32, iStride: i32, j: i32, jStride: i32): usize {
  return matrix + ((<usize>i * <usize>iStride + <usize>j * <usize>jStride) << 3);
}

/** Strips of four rows of factor·A, column after column, every element twice; missing rows are zero. */
function packLeft(
  target: usize,
  source: usize,
  rows: i32,
  depth: i32,
  rowBytes: usize,
  depthBytes: usize,
  factor: f64,
): void {
  const factors = f64x2.splat(factor);
  for (let row = 0; row < rows; row += TILE) {
    const present = min(TILE, rows - row);
    let first = source + <usize>row * rowBytes;
    if (present === TILE) {
      let second = first + rowBytes;
      let third = second + rowBytes;
      let fourth = third + rowBytes;
      for (let k = 0; k < depth; k++) {
        v128.store(target, f64x2.mul(factors, v128.load64_splat(first)));
        v128.store(target, f64x2.mul(factors, v128.load64_splat(second)), 16);
        v128.store(target, f64x2.mul(factors, v128.load64_splat(third)), 32);
        v128.store(target, f64x2.mul(factors, v128.load64_splat(fourth)), 48);
        first += depthBytes;
        second += depthBytes;
        third += depthBytes;
        fourth += depthBytes;
        target += TILE << 4;
      }
      continue;
    }
    for (let k = 0; k < depth; k++) {
      for (let t = 0; t < TILE; t++) {
        const value = t < present ? factor * load<f64>(first + <usize>t * rowBytes) : 0;
        v128.store(target + ((<usize>t) << 4), f64x2.splat(value));
      }
      first += depthBytes;
      target += TILE << 4;
    }
  }
}

/** Strips of four columns of B, row after row; missing columns are zero. */
function packRight(
  target: usize,
  source: usize,
  columns: i32,
  depth: i32,
  columnBytes: usize,
  depthBytes: usize,
): void {
  for (let column = 0; column < columns; column += TILE) {
    const present = min(TILE, columns - column);
    let from = source + <usize>column * columnBytes;
    let k = 0;
    if (present === TILE && columnBytes === 8) {
      for (; k < depth; k++) {
        v128.store(target, v128.load(from));
        v128.store(target, v128.load(from, 16), 16);
        from += depthBytes;
        target += TILE << 3;
      }
    } else if (present === TILE && depthBytes === 8) {
      for (; k + 2 <= depth; k += 2) {
        const c0 = v128.load(from);
        const c1 = v128.load(from + columnBytes);
        const c2 = v128.load(from + 2 * columnBytes);
        const c3 = v128.load(from + 3 * columnBytes);
        v128.store(target, v128.shuffle<f64>(c0, c1, 0, 2));
        v128.store(target, v128.shuffle<f64>(c2, c3, 0, 2), 16);
        v128.store(target, v128.shuffle<f64>(c0, c1, 1, 3), 32);
        v128.store(target, v128.shuffle<f64>(c2, c3, 1, 3), 48);
        from += 16;
        target += TILE << 4;
      }
    }
    for (; k < depth; k++) {
      for (let t = 0; t < TILE; t++) {
        const value = t < present ? load<f64>(from + <usize>t * columnBytes) : 0;
        store<f64>(target + ((<usize>t) << 3), value);
      }
      from += depthBytes;
      target += TILE << 3;
    }
  }
}

function tiles(
  edge: usize,
  isAdded: bool,
  c: usize,
  packedA: usize,
  packedB: usize,
  height: i32,
  depth: i32,
  width: i32,
  cBytes: usize,
): void {
  const stripBytes = (<usize>(TILE * depth)) << 3;
  for (let j = 0; j < width; j += TILE) {
    let strip = packedA;
    for (let i = 0; i < height; i += TILE) {
      const target = c + <usize>i * cBytes + ((<usize>j) << 3);
      const isWhole = height - i >= TILE && width - j >= TILE;
      if (isWhole) {
        tile(target, cBytes, strip, packedB, depth, isAdded);
      } else {
        tile(edge, TILE << 3, strip, packedB, depth, false);
        part(target, cBytes, edge, min(TILE, height - i), min(TILE, width - j), isAdded);
      }
      strip += 2 * stripBytes;
    }
    packedB += stripBytes;
  }
}

/** The part of a tile that lies inside the matrix. */
function part(target: usize, bytes: usize, tile: usize, rows: i32, columns: i32, isAdded: bool): void {
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) {
      const at = target + <usize>i * bytes + ((<usize>j) << 3);
      const value = load<f64>(tile + ((<usize>(TILE * i + j)) << 3));
      store<f64>(at, isAdded ? load<f64>(at) + value : value);
    }
  }
}

/**
 * The 4×4 elements at c become, or grow by, strip of A times strip of B. Not unrolled: the compiler would load everything first and
 * run out of registers.
 */
function tile(c: usize, cBytes: usize, a: usize, b: usize, depth: i32, isAdded: bool): void {
  let c00 = f64x2.splat(0);
  let c01 = c00;
  let c10 = c00;
  let c11 = c00;
  let c20 = c00;
  let c21 = c00;
  let c30 = c00;
  let c31 = c00;
  const end = a + ((<usize>(TILE * depth)) << 4);
  let b0: v128, b1: v128, x: v128;
  while (a < end) {
    b0 = v128.load(b);
    b1 = v128.load(b, 16);
    x = v128.load(a);
    c00 = f64x2.add(c00, f64x2.mul(x, b0));
    c01 = f64x2.add(c01, f64x2.mul(x, b1));
    x = v128.load(a, 16);
    c10 = f64x2.add(c10, f64x2.mul(x, b0));
    c11 = f64x2.add(c11, f64x2.mul(x, b1));
    x = v128.load(a, 32);
    c20 = f64x2.add(c20, f64x2.mul(x, b0));
    c21 = f64x2.add(c21, f64x2.mul(x, b1));
    x = v128.load(a, 48);
    c30 = f64x2.add(c30, f64x2.mul(x, b0));
    c31 = f64x2.add(c31, f64x2.mul(x, b1));
    a += 64;
    b += 32;
  }
  if (!isAdded) {
    v128.store(c, c00);
    v128.store(c, c01, 16);
    c += cBytes;
    v128.store(c, c10);
    v128.store(c, c11, 16);
    c += cBytes;
    v128.store(c, c20);
    v128.store(c, c21, 16);
    c += cBytes;
    v128.store(c, c30);
    v128.store(c, c31, 16);
    return;
  }
  v128.store(c, f64x2.add(v128.load(c), c00));
  v128.store(c, f64x2.add(v128.load(c, 16), c01), 16);
  c += cBytes;
  v128.store(c, f64x2.add(v128.load(c), c10));
  v128.store(c, f64x2.add(v128.load(c, 16), c11), 16);
  c += cBytes;
  v128.store(c, f64x2.add(v128.load(c), c20));
  v128.store(c, f64x2.add(v128.load(c, 16), c21), 16);
  c += cBytes;
  v128.store(c, f64x2.add(v128.load(c), c30));
  v128.store(c, f64x2.add(v128.load(c, 16), c31), 16);
}
