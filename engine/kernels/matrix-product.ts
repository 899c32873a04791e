import { matrixProductCode } from './compiled/matrix-product';
import { kernelModule } from './instantiate';
import type { KernelMemory } from './kernel-memory';

/** Exports of assembly/matrix-product.ts: addresses, counts, and strides in numbers. */
interface MatrixProductKernels {
  /** of the memory that `addProduct` works in, whatever the sizes */
  productWorkBytes(): number;
  /**
   * C += factor·A·B with A rows×inner and B inner×columns, C row-major. Element (i, k) of A stands at
   * i·aRow + k·aInner, element (k, j) of B at k·bInner + j·bColumn.
   */
  addProduct(
    work: number,
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

/** C += factor·A·B with C row-major (`column` 1), A rows×inner, B inner×columns, all in one memory. */
export type AddProduct = (
  c: PlacedMatrix,
  a: PlacedMatrix,
  b: PlacedMatrix,
  rows: number,
  inner: number,
  columns: number,
  factor?: number,
) => void;

/** The product in a memory; takes the block that it works in from there. */
export function productIn(memory: KernelMemory): AddProduct {
  const kernels = matrixProductKernels(memory);
  const { address: work } = memory.float64(kernels.productWorkBytes() / 8);
  return (c, a, b, rows, inner, columns, factor = 1) => {
    kernels.addProduct(
      work,
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
