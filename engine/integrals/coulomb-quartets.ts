import { kernelForm } from '../kernels/form';
import { coulombQuartet, QuartetWorkspace } from './coulomb-quartet';
import { withFastQuartets } from './quartet-kernel';
import type { ShellPair } from './shell-pair';

/**
 * All integrals (ab|cd) of two of the pairs, given by their places: bra products × ket products, row-major. The array
 * is written again by the next call and may be longer.
 */
export type Quartet = (bra: number, ket: number, primitiveThreshold: number) => Float64Array;

/**
 * Gives `work` the integrals of the pairs among themselves, in the form that `kernelForm` names.
 *
 * Accuracy: the two forms agree to 1e-13 of √(ab|ab) √(cd|cd), checked in
 * tests/engine/integrals/quartet-kernel.test.ts.
 */
export function withQuartets<Result>(
  pairs: readonly ShellPair[],
  work: (quartet: Quartet) => Result,
): Result {
  return kernelForm() === 'fast' ? withFastQuartets(pairs, work) : withPlainQuartets(pairs, work);
}

function withPlainQuartets<Result>(pairs: readonly ShellPair[], work: (quartet: Quartet) => Result): Result {
  const workspace = new QuartetWorkspace();
  return work((bra, ket, primitiveThreshold) => {
    coulombQuartet(pairs[bra], pairs[ket], workspace, primitiveThreshold);
    return workspace.block;
  });
}
