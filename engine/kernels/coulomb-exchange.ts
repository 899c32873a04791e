import { coulombExchangeCode } from './compiled/coulomb-exchange';
import { kernelModule } from './instantiate';

/** Exports of assembly/coulomb-exchange.ts: addresses and counts. */
interface CoulombExchangeKernels {
  /**
   * Adds to the n×n matrices J and K what the rows first ≤ pair < end of 8-fold packed integrals give, those rows at
   * the address given; in the end each matrix must be added to its transpose.
   */
  addRows(
    integrals: number,
    first: number,
    end: number,
    n: number,
    density: number,
    coulomb: number,
    exchange: number,
  ): void;
}

export const coulombExchangeKernels = kernelModule<CoulombExchangeKernels>(coulombExchangeCode);
