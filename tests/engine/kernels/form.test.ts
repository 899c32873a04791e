import { afterEach, describe, expect, it, vi } from 'vitest';
import { chooseKernels, kernelForm } from '../../../engine/kernels/form';

afterEach(() => {
  vi.unstubAllGlobals();
  vi.resetModules();
});

function withoutAddresses(): never {
  throw new RangeError('could not allocate memory');
}

describe('kernelForm', () => {
  it('identity: is fast where 128-bit vectors and shared memory are known, as they are here', () => {
    expect(kernelForm()).toBe('fast');
  });

  it('identity: is what was asked for', () => {
    try {
      chooseKernels('plain');
      expect(kernelForm()).toBe('plain');
    } finally {
      chooseKernels('fast');
    }
  });

  it.each<[string, unknown]>([
    ['that knows no WebAssembly', undefined],
    ['that refuses our code', { validate: () => false }],
    ['that gives too few addresses', { validate: () => true, Memory: withoutAddresses }],
  ])('identity: is plain on a machine %s', async (_, webAssembly) => {
    vi.stubGlobal('WebAssembly', webAssembly);
    vi.resetModules();
    const fresh = await import('../../../engine/kernels/form');
    expect(fresh.kernelForm()).toBe('plain');
  });
});
