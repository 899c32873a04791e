import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import { transformOneElectron, transformToOrbitals } from '../../../engine/integrals/orbital-transformation';

const number = fc.double({ min: -1, max: 1, noNaN: true });
const pairsOf = (n: number) => (n * (n + 1)) / 2;
const place = (i: number, j: number, k: number, l: number) => packedPair(packedPair(i, j), packedPair(k, l));

/** Random symmetric one-electron matrix, packed repulsion, and coefficients of n functions and m orbitals. */
const problem = fc
  .record({ n: fc.integer({ min: 1, max: 5 }), m: fc.integer({ min: 1, max: 5 }) })
  .chain(({ n, m }) =>
    fc.record({
      n: fc.constant(n),
      m: fc.constant(m),
      triangle: fc.array(number, { minLength: pairsOf(n), maxLength: pairsOf(n) }),
      repulsion: fc.array(number, { minLength: pairsOf(pairsOf(n)), maxLength: pairsOf(pairsOf(n)) }),
      coefficients: fc.array(number, { minLength: n * m, maxLength: n * m }),
      frozen: fc.integer({ min: 0, max: m }),
    }),
  );

describe('transformToOrbitals', () => {
  it('independent: sums written out over all function indices, frozen orbitals by the energy expression', () => {
    fc.assert(
      fc.property(problem, ({ n, m, triangle, repulsion, coefficients, frozen }) => {
        const oneElectron = Float64Array.from(
          { length: n * n },
          (_, i) => triangle[packedPair(Math.floor(i / n), i % n)],
        );
        const active = Math.max(m - frozen - 1, 0); // leaves the last orbital out
        const c = (mu: number, p: number) => coefficients[mu * m + p];
        const h = (p: number, q: number) => {
          let sum = 0;
          for (let i = 0; i < n; i++)
            for (let j = 0; j < n; j++) sum += c(i, p) * c(j, q) * oneElectron[i * n + j];
          return sum;
        };
        const g = (p: number, q: number, r: number, s: number) => {
          let sum = 0;
          for (let i = 0; i < n; i++)
            for (let j = 0; j < n; j++)
              for (let k = 0; k < n; k++)
                for (let l = 0; l < n; l++)
                  sum += c(i, p) * c(j, q) * c(k, r) * c(l, s) * repulsion[place(i, j, k, l)];
          return sum;
        };
        const result = transformToOrbitals({
          oneElectron,
          repulsion: Float64Array.from(repulsion),
          coefficients: Float64Array.from(coefficients),
          orbitalCount: m,
          frozen,
          active,
          nuclearRepulsion: 0.7,
        });

        let core = 0.7;
        for (let f = 0; f < frozen; f++) {
          core += 2 * h(f, f);
          for (let e = 0; e < frozen; e++) core += 2 * g(f, f, e, e) - g(f, e, f, e);
        }
        expect(result.orbitalCount).toBe(active);
        expect(Math.abs(result.coreEnergy - core)).toBeLessThan(1e-10);
        for (let p = 0; p < active; p++) {
          for (let q = 0; q < active; q++) {
            let field = h(frozen + p, frozen + q);
            for (let f = 0; f < frozen; f++) {
              field += 2 * g(frozen + p, frozen + q, f, f) - g(frozen + p, f, frozen + q, f);
            }
            expect(Math.abs(result.oneElectron[p * active + q] - field)).toBeLessThan(1e-10);
            for (let r = 0; r < active; r++) {
              for (let s = 0; s < active; s++) {
                const expected = g(frozen + p, frozen + q, frozen + r, frozen + s);
                expect(Math.abs(result.twoElectron[place(p, q, r, s)] - expected)).toBeLessThan(1e-10);
              }
            }
          }
        }
        expect(result.twoElectron).toHaveLength(pairsOf(pairsOf(active)));
      }),
      { seed: 5, numRuns: 40 },
    );
  });

  it('identity: unit coefficients leave the integrals as they are', () => {
    const n = 4;
    const repulsion = Float64Array.from({ length: pairsOf(pairsOf(n)) }, (_, i) => Math.sin(i));
    const oneElectron = Float64Array.from({ length: n * n }, (_, i) => Math.cos(Math.floor(i / n) * (i % n)));
    const coefficients = Float64Array.from({ length: n * n }, (_, i) => (i % (n + 1) === 0 ? 1 : 0));
    const result = transformToOrbitals({
      oneElectron,
      repulsion,
      coefficients,
      orbitalCount: n,
      frozen: 0,
      active: n,
      nuclearRepulsion: 0,
    });
    expect([...result.twoElectron]).toEqual([...repulsion]);
    expect([...result.oneElectron]).toEqual([...oneElectron]);
  });
});

describe('transformOneElectron', () => {
  it('identity: a matrix of rank one, vvᵀ, becomes (Cᵀv)(Cᵀv)ᵀ', () => {
    const v = [0.3, -1, 2];
    const matrix = Float64Array.from({ length: 9 }, (_, i) => v[Math.floor(i / 3)] * v[i % 3]);
    const coefficients = Float64Array.of(1, 0.5, -0.2, 2, 0.7, -1);
    const w = [0, 1].map((p) => v.reduce((sum, value, mu) => sum + value * coefficients[mu * 2 + p], 0));
    transformOneElectron(matrix, coefficients, 3, 2).forEach((value, i) => {
      expect(value).toBeCloseTo(w[Math.floor(i / 2)] * w[i % 2], 14);
    });
  });
});
