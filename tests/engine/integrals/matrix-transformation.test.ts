import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  type MatrixTransformation,
  rowsOfPacked,
  transformMatrices,
} from '../../../engine/integrals/matrix-transformation';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import { inForm, relativeDifference } from '../../support/kernel-forms';
import { randomArray, seededRandom } from '../../support/random';

const pairsOf = (n: number) => (n * (n + 1)) / 2;

/** LᵀMR of the first `count` rows of a packed matrix of matrices, one after another, rows × columns. */
function transformed(
  triangle: Float64Array,
  count: number,
  n: number,
  orbitals: Pick<MatrixTransformation, 'left' | 'right' | 'orbitalsNeeded'>,
): Float64Array {
  const size = (orbitals.left.length * orbitals.right.length) / n ** 2;
  const all = new Float64Array(count * size);
  transformMatrices({
    ...orbitals,
    matrices: { ...rowsOfPacked(triangle, pairsOf(n)), count },
    n,
    take: (first, width, results) => {
      const columns = orbitals.right.length / n;
      const isSymmetric = orbitals.left === orbitals.right;
      const rows = orbitals.orbitalsNeeded?.(first + width - 1) ?? orbitals.left.length / n;
      for (let p = 0; p < rows; p++) {
        for (let q = 0; q < (isSymmetric ? p + 1 : columns); q++) {
          const source = isSymmetric ? packedPair(p, q) : p * columns + q;
          for (let k = 0; k < width; k++) {
            all[(first + k) * size + p * columns + q] = results[source * width + k];
          }
        }
      }
    },
  });
  return all;
}

describe('transformMatrices', () => {
  const sizes = fc.record({
    n: fc.integer({ min: 1, max: 13 }),
    rows: fc.integer({ min: 1, max: 9 }),
    columns: fc.integer({ min: 1, max: 9 }),
    seed: fc.integer(),
  });

  it.each(['fast', 'plain'] as const)('independent: the %s form gives the double sums', (form) => {
    fc.assert(
      fc.property(sizes, ({ n, rows, columns, seed }) => {
        const random = seededRandom(seed);
        const pairs = pairsOf(n);
        const triangle = randomArray(pairsOf(pairs), random);
        const left = randomArray(n * rows, random);
        const right = randomArray(n * columns, random);
        const result = inForm(form, () => transformed(triangle, pairs, n, { left, right }));
        const expected = new Float64Array(result.length);
        for (let matrix = 0, place = 0; matrix < pairs; matrix++) {
          for (let p = 0; p < rows; p++) {
            for (let q = 0; q < columns; q++, place++) {
              for (let mu = 0; mu < n; mu++) {
                for (let nu = 0; nu < n; nu++) {
                  const element = triangle[packedPair(matrix, packedPair(mu, nu))];
                  expected[place] += left[mu * rows + p] * right[nu * columns + q] * element;
                }
              }
            }
          }
        }
        expect(relativeDifference(result, expected)).toBeLessThan(1e-12);
      }),
      { seed: 6, numRuns: 12 },
    );
  });

  it('independent: the fast form gives what the plain one does, within the same orbitals', () => {
    fc.assert(
      fc.property(sizes, fc.boolean(), ({ n, rows, seed }, isAll) => {
        const random = seededRandom(seed);
        const pairs = pairsOf(n);
        const triangle = randomArray(pairsOf(pairs), random);
        const orbitals = randomArray(n * rows, random);
        const count = isAll ? pairs : Math.min(pairs, pairsOf(rows));
        const needed = (last: number) => {
          let highest = 0;
          while (pairsOf(highest + 1) <= last) highest++;
          return Math.min(highest + 1, rows);
        };
        const [fast, plain] = (['fast', 'plain'] as const).map((form) =>
          inForm(form, () => transformed(triangle, count, n, { left: orbitals, right: orbitals })),
        );
        expect(relativeDifference(fast, plain)).toBeLessThan(1e-12);
        const part = inForm('fast', () =>
          transformed(triangle, count, n, { left: orbitals, right: orbitals, orbitalsNeeded: needed }),
        );
        for (let matrix = 0; matrix < count; matrix++) {
          for (let p = 0; p < needed(matrix); p++) {
            for (let q = 0; q <= p; q++) {
              const place = (matrix * rows + p) * rows + q;
              expect(part[place]).toBe(fast[place]);
            }
          }
        }
      }),
      { seed: 7, numRuns: 40 },
    );
  });
});
