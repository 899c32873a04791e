import { kernelForm } from '../kernels/form';
import { scratchMemory } from '../kernels/kernel-memory';
import { productIn, rowsAt, transposed } from '../kernels/matrix-product';
import { packedMatricesKernels } from '../kernels/packed-matrices';
import { transposedProductInto } from './contraction';
import { packedPair } from './orbital-integrals';

/** A row of symmetric n×n matrices, read a few at a time. */
export interface PackedMatrices {
  readonly count: number;
  /** block[pair·width + k] ← element `pair` of the packed lower triangle of matrix first + k, for k < width */
  loadInto(block: Float64Array, first: number, width: number): void;
}

/**
 * Results of `width` matrices: element (p, q) of matrix first + k stands at (p·columns + q)·width + k; of LᵀML those with
 * p ≥ q, at (p(p + 1)/2 + q)·width + k.
 */
export type TakeTransformed = (first: number, width: number, results: Float64Array) => void;

export interface MatrixTransformation {
  readonly matrices: PackedMatrices;
  /** number of functions */
  readonly n: number;
  /** n × rows of the result */
  readonly left: Float64Array;
  /** n × columns of the result; the smaller one, if there is a choice. The same array as `left`: LᵀML */
  readonly right: Float64Array;
  readonly take: TakeTransformed;
  /** where `left` and `right` are the same: how many orbitals matter for the matrices up to this one; default all */
  readonly orbitalsNeeded?: (last: number) => number;
}

/** Matrices that a kernel transforms together. Wider rows would leave the cache, shorter ones are soon done. */
const TOGETHER = 64;
/** Functions below which copying to the kernel costs more than it saves. */
const FEWEST_FUNCTIONS = 6;

/**
 * LᵀML of many symmetric matrices M, or LᵀMR.
 *
 * Cost: count·(n²·columns + n·rows·columns) multiplications, half of the second for LᵀML. Kernel memory:
 * 64·(n(n + 1)/2 + n·columns + rows·columns + n) numbers, whatever the count.
 */
export function transformMatrices(transformation: MatrixTransformation): void {
  if (kernelForm() === 'fast' && transformation.n >= FEWEST_FUNCTIONS) transformTogether(transformation);
  else transformOneByOne(transformation);
}

function transformOneByOne({ matrices, n, left, right, take }: MatrixTransformation): void {
  const rows = left.length / n;
  const columns = right.length / n;
  const packed = new Float64Array((n * (n + 1)) / 2);
  const square = new Float64Array(n * n);
  const half = new Float64Array(n * columns);
  const result = new Float64Array(rows * columns);
  for (let index = 0; index < matrices.count; index++) {
    matrices.loadInto(packed, index, 1);
    for (let mu = 0, pair = 0; mu < n; mu++) {
      for (let nu = 0; nu <= mu; nu++, pair++) {
        square[mu * n + nu] = packed[pair];
        square[nu * n + mu] = packed[pair];
      }
    }
    transposedProductInto(square, n, right, columns, n, half);
    transposedProductInto(left, rows, half, columns, n, result, left === right);
    if (left === right) packLowerTriangle(result, rows);
    take(index, 1, result);
  }
}

/** The lower triangle of a square matrix, row by row from its beginning on. */
function packLowerTriangle(matrix: Float64Array, n: number): void {
  for (let row = 1; row < n; row++) {
    matrix.copyWithin(packedPair(row, 0), row * n, row * n + row + 1);
  }
}

/**
 * The same for `width` matrices in every product: X(μ; q, k) = Σ_ν R(ν, q)·M_k(μ, ν) for one μ after another, then
 * Σ_μ L(μ, p)·X(μ; q, k), of LᵀML for q ≤ p only.
 */
function transformTogether(transformation: MatrixTransformation): void {
  const { matrices, n, left, right, take, orbitalsNeeded } = transformation;
  const isSymmetric = left === right;
  const allRows = left.length / n;
  const allColumns = right.length / n;
  const memory = scratchMemory();
  memory.scope(() => {
    const productInto = productIn(memory);
    const { copyMatrixRow } = packedMatricesKernels(memory);
    const leftBlock = memory.float64(left.length);
    leftBlock.view.set(left);
    const rightBlock = isSymmetric ? leftBlock : memory.float64(right.length);
    rightBlock.view.set(right);
    const packed = memory.float64(((n * (n + 1)) / 2) * TOGETHER);
    const matrixRow = memory.float64(n * TOGETHER);
    const half = memory.float64(n * allColumns * TOGETHER);
    const results = memory.float64(allRows * allColumns * TOGETHER);
    for (let first = 0; first < matrices.count; first += TOGETHER) {
      const width = Math.min(TOGETHER, matrices.count - first);
      const needed = isSymmetric && orbitalsNeeded ? orbitalsNeeded(first + width - 1) : undefined;
      const columns = needed ?? allColumns;
      const rowLength = columns * width;
      matrices.loadInto(packed.view, first, width);
      for (let mu = 0; mu < n; mu++) {
        copyMatrixRow(matrixRow.address, packed.address, mu, n, width);
        productInto(
          rowsAt(half.address + 8 * mu * rowLength, width),
          transposed(rowsAt(rightBlock.address, allColumns)),
          rowsAt(matrixRow.address, width),
          columns,
          n,
          width,
        );
      }
      // the orbitals before `end` with that of one stretch of X
      const multiply = (end: number, orbital: number, target: number, targetRow: number) =>
        productInto(
          rowsAt(results.address + 8 * target, targetRow),
          transposed(rowsAt(leftBlock.address, allRows)),
          rowsAt(half.address + 8 * orbital * width, rowLength),
          end,
          n,
          width,
        );
      if (isSymmetric) {
        for (let p = 0; p < columns; p++) multiply(p + 1, p, packedPair(p, 0) * width, width);
      } else {
        for (let q = 0; q < columns; q++) multiply(allRows, q, q * width, rowLength);
      }
      take(first, width, results.view);
    }
  });
}

/** Matrices in the rows of a symmetric one of which the lower triangle is stored: matrix i is row i. */
export function rowsOfPacked(triangle: Float64Array, length: number): PackedMatrices {
  return {
    count: length,
    loadInto(block, first, width) {
      const end = first + width;
      // left of the diagonal block the triangle's own rows, below it its columns
      for (let k = 0; k < width; k++) {
        const row = first + k;
        const start = (row * (row + 1)) / 2;
        for (let i = 0; i <= row; i++) block[i * width + k] = triangle[start + i];
        for (let i = row + 1; i < end; i++) block[i * width + k] = triangle[(i * (i + 1)) / 2 + row];
      }
      for (let i = end; i < length; i++) {
        const start = (i * (i + 1)) / 2 + first;
        for (let k = 0; k < width; k++) block[i * width + k] = triangle[start + k];
      }
    },
  };
}
