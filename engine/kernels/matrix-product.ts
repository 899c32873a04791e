import { matrixProductCode } from './compiled/matrix-product';
import { kernelModule } from './instantiate';
import type { KernelMemory } from './kernel-memory';

/** Exports of assembly/matrix-product.ts: addresses, counts, and strides in numbers. */
interface MatrixProductKernels {
  /** of the memory that `productInto` works in, whatever the sizes */
  productWorkBytes(): number;
  /**
   * C = factor·A·B, or C += factor·A·B, with A rows×inner and B inner×columns, C row-major. Element (i, k) of A
   * stands at i·aRow + k·aInner, element (k, j) of B at k·bInner + j·bColumn.
   */
  productInto(
    work: number,
    isAdded: boolean,
    factor: number,
    c: number,
    a: number,
    b: number,
    rows: number,
    inner: number,
    columns: number,
    cRow: number,
    aRow: number,
    aInner: number,
    bInner: number,
    bColumn: number,
  ): void;
}

const matrixProductKernels = kernelModule<MatrixProductKernels>(matrixProductCode);

/** A matrix or a part of one in kernel memory: its first element, and the distances between rows and columns. */
export interface PlacedMatrix {
  readonly address: number;
  readonly row: number;
  readonly column: number;
}

/** Row-major, the rows `length` apart. */
export function rowsAt(address: number, length: number): PlacedMatrix {
  return { address, row: length, column: 1 };
}

export function transposed({ address, row, column }: PlacedMatrix): PlacedMatrix {
  return { address, row: column, column: row };
}

export interface ProductOptions {
  /** default 1 */
  readonly factor?: number;
  /** to what stands there; default false */
  readonly isAdded?: boolean;
}

/** C = factor·A·B with C row-major (`column` 1), A rows×inner, B inner×columns, all in one memory. */
export type ProductInto = (
  c: PlacedMatrix,
  a: PlacedMatrix,
  b: PlacedMatrix,
  rows: number,
  inner: number,
  columns: number,
  options?: ProductOptions,
) => void;

/** The product in a memory; takes the block that it works in from there. */
export function productIn(memory: KernelMemory): ProductInto {
  const kernels = matrixProductKernels(memory);
  const { address: work } = memory.float64(kernels.productWorkBytes() / 8);
  return (c, a, b, rows, inner, columns, { factor = 1, isAdded = false } = {}) => {
    kernels.productInto(
      work,
      isAdded,
      factor,
      c.address,
      a.address,
      b.address,
      rows,
      inner,
      columns,
      c.row,
      a.row,
      a.column,
      b.row,
      b.column,
    );
  };
}
