import { describe, expect, it } from 'vitest';
import { KernelMemory } from '../../../engine/kernels/kernel-memory';
import { productIn } from '../../../engine/kernels/matrix-product';
import { DividedTridiagonal } from '../../../engine/linear-algebra/divide-and-conquer';

/** Values with their vectors, and the largest errors of T·v = λ·v and of vᵀ·w = δ. */
function solve(diagonal: number[], offDiagonal: number[]) {
  const n = diagonal.length;
  const memory = new KernelMemory();
  const values = Float64Array.from(diagonal);
  const couplings = Float64Array.from([0, ...offDiagonal]);
  const { view: vectors } = new DividedTridiagonal(values, couplings, memory, productIn(memory)).solve();
  let residual = 0;
  let overlap = 0;
  for (let k = 0; k < n; k++) {
    const v = vectors.subarray(k * n, (k + 1) * n);
    for (let i = 0; i < n; i++) {
      const left = i > 0 ? couplings[i] * v[i - 1] : 0;
      const right = i < n - 1 ? couplings[i + 1] * v[i + 1] : 0;
      residual = Math.max(residual, Math.abs(left + (diagonal[i] - values[k]) * v[i] + right));
    }
    for (let l = 0; l <= k; l++) {
      let sum = k === l ? -1 : 0;
      for (let i = 0; i < n; i++) sum += v[i] * vectors[l * n + i];
      overlap = Math.max(overlap, Math.abs(sum));
    }
  }
  return { values: values.slice().sort(), residual, overlap };
}

const constant = (length: number, value: number) => Array.from({ length }, () => value);

describe('DividedTridiagonal', () => {
  it.each([1, 16, 17, 64, 101])(
    'identity: second differences have the values 2 − 2cos(kπ/(n+1)), n = %i',
    (n) => {
      const { values, residual, overlap } = solve(constant(n, 2), constant(n - 1, -1));
      values.forEach((value, k) => {
        expect(Math.abs(value - (2 - 2 * Math.cos(((k + 1) * Math.PI) / (n + 1))))).toBeLessThan(1e-14);
      });
      expect(residual).toBeLessThan(2e-14);
      expect(overlap).toBeLessThan(1e-14);
    },
  );

  it('identity: Wilkinson’s W101+, whose values agree in pairs to the last digit', () => {
    const diagonal = Array.from({ length: 101 }, (_, i) => Math.abs(i - 50));
    const { values, residual, overlap } = solve(diagonal, constant(100, 1));
    expect(values[100] - values[99]).toBeLessThan(1e-13);
    expect(residual).toBeLessThan(1e-13);
    expect(overlap).toBeLessThan(1e-14);
  });

  it('identity: couplings of zero, also where it is divided, leave the diagonal as the values', () => {
    const diagonal = Array.from({ length: 40 }, (_, i) => (i * 17) % 40);
    const { values, residual, overlap } = solve(diagonal, constant(39, 0));
    expect(Array.from(values)).toEqual(diagonal.slice().sort((a, b) => a - b));
    expect(residual).toBe(0);
    expect(overlap).toBe(0);
  });

  it('identity: couplings that grow by 18 decades leave residuals of the size of the largest', () => {
    const n = 60;
    const couplings = Array.from({ length: n - 1 }, (_, i) => 10 ** (-18 + (18 * i) / (n - 2)));
    const { residual, overlap } = solve(constant(n, 0), couplings);
    expect(residual).toBeLessThan(1e-14);
    expect(overlap).toBeLessThan(1e-14);
  });
});
