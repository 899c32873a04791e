import { describe, expect, it } from 'vitest';
import { matrixProductCode } from '../../../engine/kernels/compiled/matrix-product';
import { kernelModule } from '../../../engine/kernels/instantiate';
import { KernelMemory } from '../../../engine/kernels/kernel-memory';

describe('kernelModule', () => {
  const kernels = kernelModule<{ productWorkBytes(): number }>(matrixProductCode);

  it('identity: one instance for each memory, and one alone', () => {
    const first = new KernelMemory();
    const second = new KernelMemory();
    expect(kernels(first)).toBe(kernels(first));
    expect(kernels(first)).toBe(kernels(new KernelMemory(first.wasm)));
    expect(kernels(first)).not.toBe(kernels(second));
  });

  it('identity: the functions run', () => {
    expect(kernels(new KernelMemory()).productWorkBytes()).toBeGreaterThan(0);
  });
});
