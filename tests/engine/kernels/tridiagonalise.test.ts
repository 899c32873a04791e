import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { KernelMemory } from '../../../engine/kernels/kernel-memory';
import { tridiagonaliseKernels } from '../../../engine/kernels/tridiagonalise';
import { tridiagonalise } from '../../../engine/linear-algebra/tridiagonalise';
import { relativeDifference } from '../../support/kernel-forms';
import { randomSymmetric, seededRandom } from '../../support/random';

describe('tridiagonalise', () => {
  it('independent: diagonal, off-diagonal and reflections are those of the plain form', () => {
    const memory = new KernelMemory();
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 24 }), fc.integer(), fc.boolean(), (n, seed, isBanded) => {
        const matrix = randomSymmetric(n, seededRandom(seed));
        // rows that have the wanted form already
        if (isBanded)
          matrix.forEach((_, i) => {
            if (Math.abs(Math.floor(i / n) - (i % n)) > 1) matrix[i] = 0;
          });
        const reduced = matrix.slice();
        const plain = tridiagonalise(reduced, n);
        memory.scope(() => {
          const a = memory.float64(n * n);
          a.view.set(matrix);
          const [diagonal, offDiagonal, halfSquares] = [0, 1, 2].map(() => memory.float64(n));
          tridiagonaliseKernels(memory).tridiagonalise(
            memory.float64(3 * n).address,
            a.address,
            n,
            diagonal.address,
            offDiagonal.address,
            halfSquares.address,
          );
          expect(relativeDifference(diagonal.view, plain.diagonal)).toBeLessThan(1e-11);
          expect(relativeDifference(offDiagonal.view, plain.offDiagonal)).toBeLessThan(1e-11);
          expect(relativeDifference(halfSquares.view, plain.halfSquares)).toBeLessThan(1e-11);
          for (let i = 1; i < n; i++) {
            if (plain.halfSquares[i] === 0) continue;
            const row = [i * n, i * n + i] as const;
            expect(relativeDifference(a.view.slice(...row), reduced.slice(...row))).toBeLessThan(1e-10);
          }
        });
      }),
      { seed: 8, numRuns: 60 },
    );
  });
});
