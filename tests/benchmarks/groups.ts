import { closedShellDoubles } from './closed-shell-doubles';
import { curvePoints } from './curve-points';
import { denseAlgebra } from './dense-algebra';
import { electronRepulsion } from './electron-repulsion';
import { hamiltonianProducts, largeProduct } from './hamiltonian-product';
import type { Measurement } from './measure';
import { wholeRuns } from './whole-runs';

export interface BenchmarkGroup {
  readonly name: string;
  measure(): readonly Measurement[] | Promise<readonly Measurement[]>;
}

export const GROUPS: readonly BenchmarkGroup[] = [
  { name: 'dense algebra', measure: denseAlgebra },
  { name: 'electron repulsion', measure: electronRepulsion },
  { name: 'Hamiltonian product', measure: hamiltonianProducts },
  { name: 'CISD of closed shells', measure: closedShellDoubles },
  { name: 'curve points', measure: curvePoints },
  { name: 'whole runs', measure: wholeRuns },
];

/** Measured only when asked for: takes minutes. */
export const LARGE_GROUPS: readonly BenchmarkGroup[] = [
  { name: 'large Hamiltonian product', measure: largeProduct },
];
