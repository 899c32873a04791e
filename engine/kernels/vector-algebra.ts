import { vectorAlgebraCode } from './compiled/vector-algebra';
import { kernelModule } from './instantiate';

/** Elements of a vector in one task, as of assembly/vector-algebra.ts … */
export const TASK_ELEMENTS = 16384;
/** … and those of each vector in the scratch of a rotation. */
export const ROTATED_ELEMENTS = 1024;

/** Exports of assembly/vector-algebra.ts: the address of a pass, see there. */
interface VectorAlgebraKernels {
  combineTask(pass: number, task: number, thread: number): void;
  dotTask(pass: number, task: number, thread: number): void;
  rotateTask(pass: number, task: number, thread: number): void;
}

export const vectorAlgebraKernels = kernelModule<VectorAlgebraKernels>(vectorAlgebraCode);
