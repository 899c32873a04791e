import { chooseKernels, type KernelForm, kernelForm } from '../../engine/kernels/form';

/** What `work` gives with all kernels in one form; the form before is then back. */
export function inForm<Result>(form: KernelForm, work: () => Result): Result {
  const before = kernelForm();
  chooseKernels(form);
  try {
    return work();
  } finally {
    chooseKernels(before);
  }
}

/** Largest difference of two arrays beside the largest number in the second. */
export function relativeDifference(actual: Float64Array, expected: Float64Array): number {
  if (actual.length !== expected.length) return Number.POSITIVE_INFINITY;
  let difference = 0;
  let largest = Number.MIN_VALUE;
  for (let i = 0; i < expected.length; i++) {
    difference = Math.max(difference, Math.abs(actual[i] - expected[i]));
    largest = Math.max(largest, Math.abs(expected[i]));
  }
  return difference / largest;
}
