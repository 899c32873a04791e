import { electronRepulsionCode } from './compiled/electron-repulsion';
import { kernelModule } from './instantiate';

/** Exports of assembly/electron-repulsion.ts: addresses of records, see there. */
interface ElectronRepulsionKernels {
  /** leaves the integrals in the block of the workspace, bra products × ket products, row-major */
  coulombQuartet(bra: number, ket: number, workspace: number, primitiveThreshold: number): void;
}

export const electronRepulsionKernels = kernelModule<ElectronRepulsionKernels>(electronRepulsionCode);
