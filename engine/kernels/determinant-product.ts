import { determinantProductCode } from './compiled/determinant-product';
import { kernelModule } from './instantiate';

/** Exports of assembly/determinant-product.ts. */
interface DeterminantProductKernels {
  rowTask(plan: number, task: number, thread: number): void;
  /** after all row tasks */
  columnTask(plan: number, task: number, thread: number): void;
}

export const determinantProductKernels = kernelModule<DeterminantProductKernels>(determinantProductCode);
