import { tridiagonaliseCode } from './compiled/tridiagonalise';
import { kernelModule } from './instantiate';

/** Exports of assembly/tridiagonalise.ts: addresses and counts. */
interface TridiagonaliseKernels {
  /**
   * As `tridiagonalise` of linear-algebra/: a n×n row-major, lower triangle read; diagonal, off-diagonal and half
   * squares n each; work 3n numbers.
   */
  tridiagonalise(
    work: number,
    a: number,
    n: number,
    diagonal: number,
    offDiagonal: number,
    halfSquares: number,
  ): void;
}

export const tridiagonaliseKernels = kernelModule<TridiagonaliseKernels>(tridiagonaliseCode);
