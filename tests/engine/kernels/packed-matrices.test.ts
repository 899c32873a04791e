import { describe, expect, it } from 'vitest';
import { KernelMemory } from '../../../engine/kernels/kernel-memory';
import { packedMatricesKernels } from '../../../engine/kernels/packed-matrices';

describe('copyMatrixRow', () => {
  it.each([1, 2, 7])('identity: gives row i of %i symmetric matrices', (width) => {
    const memory = new KernelMemory();
    const n = 5;
    const packed = memory.float64(15 * width);
    for (let i = 0, pair = 0; i < n; i++) {
      for (let j = 0; j <= i; j++, pair++) {
        for (let k = 0; k < width; k++) packed.view[pair * width + k] = 100 * k + 10 * i + j;
      }
    }
    const row = memory.float64(n * width);
    for (let i = 0; i < n; i++) {
      packedMatricesKernels(memory).copyMatrixRow(row.address, packed.address, i, n, width);
      row.view.forEach((value, place) => {
        const [j, k] = [Math.floor(place / width), place % width];
        expect(value).toBe(100 * k + 10 * Math.max(i, j) + Math.min(i, j));
      });
    }
  });
});
