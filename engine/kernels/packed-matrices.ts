import { packedMatricesCode } from './compiled/packed-matrices';
import { kernelModule } from './instantiate';

/** Exports of assembly/packed-matrices.ts: addresses and counts. */
interface PackedMatricesKernels {
  /**
   * One row of `width` symmetric n×n matrices. Of the packed ones, element (i ≥ j) of all matrices stands in one run
   * at (i(i + 1)/2 + j)·width; the target is n×width, row-major.
   */
  copyMatrixRow(target: number, packed: number, row: number, n: number, width: number): void;
}

export const packedMatricesKernels = kernelModule<PackedMatricesKernels>(packedMatricesCode);
