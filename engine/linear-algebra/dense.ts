/** Dense matrices, row-major Float64Array. Products above a small size run as compiled kernels where they can. */

import { kernelForm } from '../kernels/form';
import { scratchMemory } from '../kernels/kernel-memory';
import { type PlacedMatrix, productIn, rowsAt, transposed } from '../kernels/matrix-product';

/** Multiply–adds below which a product is done before its matrices were copied to the kernel. */
const SMALL_PRODUCT = 2000;

/** C = A·B with A rows×inner, B inner×columns. Allocates rows×columns. */
export function multiply(
  a: Float64Array,
  b: Float64Array,
  rows: number,
  inner: number,
  columns: number,
): Float64Array {
  if (rows * inner * columns >= SMALL_PRODUCT && kernelForm() === 'fast') {
    return fastProduct(a, b, rows, inner, columns, (x, y) => [rowsAt(x, inner), rowsAt(y, columns)]);
  }
  const product = new Float64Array(rows * columns);
  for (let i = 0; i < rows; i++) {
    const target = i * columns;
    for (let k = 0; k < inner; k++) {
      const factor = a[i * inner + k];
      if (factor === 0) continue;
      const source = k * columns;
      for (let j = 0; j < columns; j++) product[target + j] += factor * b[source + j];
    }
  }
  return product;
}

/** C = Aᵀ·B with A inner×rows, B inner×columns. Allocates rows×columns. */
export function multiplyLeftTransposed(
  a: Float64Array,
  b: Float64Array,
  rows: number,
  inner: number,
  columns: number,
): Float64Array {
  if (rows * inner * columns >= SMALL_PRODUCT && kernelForm() === 'fast') {
    return fastProduct(a, b, rows, inner, columns, (x, y) => [
      transposed(rowsAt(x, rows)),
      rowsAt(y, columns),
    ]);
  }
  const product = new Float64Array(rows * columns);
  for (let k = 0; k < inner; k++) {
    for (let i = 0; i < rows; i++) {
      const factor = a[k * rows + i];
      if (factor === 0) continue;
      const target = i * columns;
      const source = k * columns;
      for (let j = 0; j < columns; j++) product[target + j] += factor * b[source + j];
    }
  }
  return product;
}

/** C = A·Bᵀ with A rows×inner, B columns×inner. Allocates rows×columns. */
export function multiplyRightTransposed(
  a: Float64Array,
  b: Float64Array,
  rows: number,
  inner: number,
  columns: number,
): Float64Array {
  if (rows * inner * columns >= SMALL_PRODUCT && kernelForm() === 'fast') {
    return fastProduct(a, b, rows, inner, columns, (x, y) => [
      rowsAt(x, inner),
      transposed(rowsAt(y, inner)),
    ]);
  }
  const product = new Float64Array(rows * columns);
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) {
      let sum = 0;
      for (let k = 0; k < inner; k++) sum += a[i * inner + k] * b[j * inner + k];
      product[i * columns + j] = sum;
    }
  }
  return product;
}

/** @param place - how the factors lie in memory, from the addresses of their first numbers */
function fastProduct(
  a: Float64Array,
  b: Float64Array,
  rows: number,
  inner: number,
  columns: number,
  place: (a: number, b: number) => [PlacedMatrix, PlacedMatrix],
): Float64Array {
  const memory = scratchMemory();
  return memory.scope(() => {
    const productInto = productIn(memory);
    const left = memory.float64(rows * inner);
    const right = memory.float64(inner * columns);
    const product = memory.float64(rows * columns);
    left.view.set(a);
    right.view.set(b);
    productInto(
      rowsAt(product.address, columns),
      ...place(left.address, right.address),
      rows,
      inner,
      columns,
    );
    return product.view.slice();
  });
}

/** Xᵀ·A·X for a square A (n×n) and X n×m: the matrix of an operator in another set of functions, m×m. */
export function congruence(matrix: Float64Array, x: Float64Array, n: number, m: number): Float64Array {
  return multiplyLeftTransposed(x, multiply(matrix, x, n, n, m), m, n, m);
}

/** Aᵀ of a rows×columns matrix. */
export function transpose(matrix: Float64Array, rows: number, columns: number): Float64Array {
  const turned = new Float64Array(matrix.length);
  for (let i = 0; i < rows; i++)
    for (let j = 0; j < columns; j++) turned[j * rows + i] = matrix[i * columns + j];
  return turned;
}

/** Σ aᵢ·bᵢ; for two symmetric matrices the trace of their product. */
export function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}

/** y ← y + factor·x. */
export function addScaledInto(y: Float64Array, factor: number, x: Float64Array): void {
  for (let i = 0; i < y.length; i++) y[i] += factor * x[i];
}

/** Largest |aᵢ|; NaN if any is, so that a broken vector cannot pass as a small one. */
export function maximumAbsolute(a: Float64Array): number {
  let largest = 0;
  for (let i = 0; i < a.length; i++) largest = Math.max(largest, Math.abs(a[i]));
  return largest;
}
