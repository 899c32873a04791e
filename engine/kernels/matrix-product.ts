import { matrixProductCode } from './compiled/matrix-product';
import { kernelModule } from './instantiate';

/** Exports of assembly/matrix-product.ts: addresses and counts. */
interface MatrixProductKernels {
  /** C += A·B, row-major; the strides are the lengths of the rows */
  addProduct(
    c: number,
    a: number,
    b: number,
    rows: number,
    inner: number,
    columns: number,
    cStride: number,
    aStride: number,
    bStride: number,
  ): void;
}

export const matrixProductKernels = kernelModule<MatrixProductKernels>(matrixProductCode);
