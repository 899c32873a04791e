import { secularEquationCode } from './compiled/secular-equation';
import { kernelModule } from './instantiate';

/** Exports of assembly/secular-equation.ts: addresses, counts and one number. */
interface SecularEquationKernels {
  /**
   * Eigenvalues of D + ρ·z·zᵀ; d rising without equal ones, no z zero. Writes k values and, in row j of k×k,
   * d(i) − value j. Work: 2 numbers.
   *
   * @returns −1, or the number of a root that was not found
   */
  solveSecular(
    work: number,
    d: number,
    z: number,
    rho: number,
    k: number,
    values: number,
    differences: number,
  ): number;
  /**
   * Its eigenvectors, a row each, in the place of the differences; element i of a vector goes to the place that the
   * i-th of k 32-bit integers says. Work: 2k numbers.
   */
  secularVectors(work: number, d: number, z: number, k: number, position: number, differences: number): void;
}

export const secularEquationKernels = kernelModule<SecularEquationKernels>(secularEquationCode);
