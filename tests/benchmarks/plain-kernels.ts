import { chooseKernels, kernelForm } from '../../engine/kernels/form';

/** Runs `work` with the plain form of every kernel: the reference that fast kernels are measured against. */
export function withPlainKernels<T>(work: () => T): T {
  const form = kernelForm();
  chooseKernels('plain');
  try {
    return work();
  } finally {
    chooseKernels(form);
  }
}
