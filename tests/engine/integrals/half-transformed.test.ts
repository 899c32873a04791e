import { describe, expect, it } from 'vitest';
import { HalfTransformed } from '../../../engine/integrals/half-transformed';
import { inForm } from '../../support/kernel-forms';

describe('HalfTransformed', () => {
  it.each([
    ['fast', 4],
    ['fast', 64],
    ['plain', 1],
  ] as const)(
    'identity: what came in by matrices goes out by results, %s form, %i together',
    (form, block) => {
      const matrices = 10;
      const results = 7;
      const value = (matrix: number, result: number) => 100 * matrix + result;
      inForm(form, () =>
        HalfTransformed.use(matrices, results, (half) => {
          for (let first = 0; first < matrices; first += block) {
            const width = Math.min(block, matrices - first);
            // a longer array than it needs, as the kernels leave it
            const all = Float64Array.from({ length: (results + 1) * width }, (_, i) =>
              value(first + (i % width), Math.floor(i / width)),
            );
            half.keep(first, width, all);
          }
          const loaded = new Float64Array(matrices * 5);
          half.loadInto(loaded, 2, 5);
          loaded.forEach((found, i) => {
            expect(found).toBe(value(Math.floor(i / 5), 2 + (i % 5)));
          });
        }),
      );
    },
  );
});
