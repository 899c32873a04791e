import { fullProductCode } from './compiled/full-product';
import { kernelModule } from './instantiate';

/** Exports of assembly/full-product.ts. */
interface FullProductKernels {
  rowTask(plan: number, task: number, thread: number): void;
  /** after all row tasks */
  columnTask(plan: number, task: number, thread: number): void;
}

export const fullProductKernels = kernelModule<FullProductKernels>(fullProductCode);
