import { decodeBase64 } from './base64';
import { matrixProductCode } from './compiled/matrix-product';
import { KernelMemoryFull, scratchMemory, tablesMemory } from './kernel-memory';
import { webAssembly } from './web-assembly';

/** `fast`: compiled kernels with 128-bit vectors; `plain`: the TypeScript that they are checked against. */
export type KernelForm = 'fast' | 'plain';

let chosen: KernelForm | undefined;

/** The one place that decides which form of every kernel runs: the fast one wherever this machine can. */
export function kernelForm(): KernelForm {
  chosen ??= canRunFast() ? 'fast' : 'plain';
  return chosen;
}

/** For comparisons. What was prepared before (a Hamiltonian product, say) keeps its form. */
export function chooseKernels(form: KernelForm): void {
  chosen = form;
}

function canRunFast(): boolean {
  // false where the processor, or the host, knows no 128-bit vectors or no shared memory
  if (!webAssembly?.validate(decodeBase64(matrixProductCode))) return false;
  try {
    // each reserves addresses for more than 4 GiB, which batch systems that limit them refuse
    return [scratchMemory(), tablesMemory()].every(({ wasm }) => wasm !== undefined);
  } catch (error) {
    if (error instanceof KernelMemoryFull) return false;
    throw error;
  }
}
