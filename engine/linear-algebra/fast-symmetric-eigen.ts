import { type KernelMemory, scratchMemory } from '../kernels/kernel-memory';
import { type ProductInto, productIn, rowsAt, transposed } from '../kernels/matrix-product';
import { tridiagonaliseKernels } from '../kernels/tridiagonalise';
import { DividedTridiagonal } from './divide-and-conquer';
import type { SymmetricEigen } from './symmetric-eigen';

/** Reflections that are applied together, as products. */
const REFLECTIONS_TOGETHER = 32;

/**
 * The compiled form of `symmetricEigen`: reduction in one kernel, division of the tridiagonal matrix, and the
 * reflections applied to its eigenvectors in blocks (R. Schreiber, C. Van Loan, SIAM J. Sci. Stat. Comput. 10, 53
 * (1989)).
 *
 * @param matrix - n×n, row-major, lower triangle read
 * @param scale - near its largest element
 * @throws EigenvaluesNotConverged
 */
export function fastSymmetricEigen(matrix: Float64Array, n: number, scale: number): SymmetricEigen {
  const memory = scratchMemory();
  return memory.scope(() => {
    const productInto = productIn(memory);
    const reduced = memory.float64(n * n);
    const diagonal = memory.float64(n);
    const offDiagonal = memory.float64(n);
    const halfSquares = memory.float64(n);
    for (let i = 0; i < n * n; i++) reduced.view[i] = matrix[i] / scale;
    memory.scope(() => {
      const work = memory.float64(3 * n);
      tridiagonaliseKernels(memory).tridiagonalise(
        work.address,
        reduced.address,
        n,
        diagonal.address,
        offDiagonal.address,
        halfSquares.address,
      );
    });
    const values = diagonal.view.slice();
    const vectors = new DividedTridiagonal(values, offDiagonal.view.slice(), memory, productInto).solve();
    memory.scope(() =>
      applyReflections(memory, productInto, reduced.view, halfSquares.view, vectors.address, n),
    );
    return inRisingOrder(values, vectors.view, n, scale);
  });
}

/**
 * Z ← Z·Pᵀ for the product P of all reflections, the one of the last row leftmost. A block of them is 1 − Vᵀ·T·V with
 * a reflection's vector in each row of V and a lower triangular T.
 *
 * @param vectors - address of Z, n×n row-major
 */
function applyReflections(
  memory: KernelMemory,
  productInto: ProductInto,
  reduced: Float64Array,
  halfSquares: Float64Array,
  vectors: number,
  n: number,
): void {
  const most = REFLECTIONS_TOGETHER;
  const reflections = memory.float64(most * n);
  const overlaps = memory.float64(most * most);
  const triangle = memory.float64(most * most);
  const inReflections = memory.float64(n * most);
  const combined = memory.float64(n * most);
  for (let start = 1; start < n; start += most) {
    const end = Math.min(start + most, n);
    const count = end - start;
    const length = end - 1;
    for (let r = 0; r < count; r++) {
      const i = start + r;
      reflections.view.set(reduced.subarray(i * n, i * n + i), r * length);
      reflections.view.fill(0, r * length + i, (r + 1) * length);
    }
    const v = rowsAt(reflections.address, length);
    productInto(rowsAt(overlaps.address, count), v, transposed(v), count, length, count);
    fillTriangle(triangle.view, overlaps.view, halfSquares, start, count);
    const [z, zv, zvt] = [
      rowsAt(vectors, n),
      rowsAt(inReflections.address, count),
      rowsAt(combined.address, count),
    ];
    productInto(zv, z, transposed(v), n, length, count);
    productInto(zvt, zv, transposed(rowsAt(triangle.address, count)), n, count, count);
    productInto(z, zvt, v, n, count, length, { factor: -1, isAdded: true });
  }
}

/** T of the reflections `start` …: another one, 1 − τ·u·uᵀ, adds the row −τ·(uᵀV)·T and the element τ. */
function fillTriangle(
  triangle: Float64Array,
  overlaps: Float64Array,
  halfSquares: Float64Array,
  start: number,
  count: number,
): void {
  triangle.fill(0, 0, count * count);
  for (let j = 0; j < count; j++) {
    const half = halfSquares[start + j];
    if (half === 0) continue;
    triangle[j * count + j] = 1 / half;
    for (let k = 0; k < j; k++) {
      let sum = 0;
      for (let l = k; l < j; l++) sum += overlaps[j * count + l] * triangle[l * count + k];
      triangle[j * count + k] = -sum / half;
    }
  }
}

/** @param rows - an eigenvector a row */
function inRisingOrder(values: Float64Array, rows: Float64Array, n: number, scale: number): SymmetricEigen {
  const order = Array.from(values.keys()).sort((a, b) => values[a] - values[b]);
  const vectors = new Float64Array(n * n);
  // in pieces, so that the lines of the columns that are being written stay in the cache
  for (let first = 0; first < n; first += REFLECTIONS_TOGETHER) {
    const end = Math.min(first + REFLECTIONS_TOGETHER, n);
    for (let k = 0; k < n; k++) {
      const row = order[k] * n;
      for (let i = first; i < end; i++) vectors[i * n + k] = rows[row + i];
    }
  }
  return { values: Float64Array.from(order, (k) => values[k] * scale), vectors };
}
