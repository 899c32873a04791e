/**
 * Products of small dense matrices, row-major Float64Array. The plain forms: loops run along memory so that
 * a fast form with the same signature can stand beside them.
 */

/** C = A·B with A rows×inner, B inner×columns. Allocates rows×columns. */
export function multiply(
  a: Float64Array,
  b: Float64Array,
  rows: number,
  inner: number,
  columns: number,
): Float64Array {
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
