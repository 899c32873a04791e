import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { packedPair } from '../../../engine/integrals/orbital-integrals';
import { transformToOrbitals } from '../../../engine/integrals/orbital-transformation';
import { transformToSpinOrbitals } from '../../../engine/integrals/unrestricted-transformation';
import { randomArray, randomSymmetric, seededRandom } from '../../support/random';

/** Random integrals over n functions, and m alpha and m beta orbitals. */
function problem(n: number, m: number, seed: number) {
  const random = seededRandom(seed);
  const pairs = (n * (n + 1)) / 2;
  return {
    oneElectron: randomSymmetric(n, random),
    overlap: randomSymmetric(n, random),
    repulsion: randomArray((pairs * (pairs + 1)) / 2, random),
    coefficients: [randomArray(n * m, random), randomArray(n * m, random)] as const,
    orbitalCount: m,
    nuclearRepulsion: 0.7,
  };
}

describe('transformToSpinOrbitals', () => {
  it('independent: sums written out over all function indices, frozen orbitals by the energy expression', () => {
    const cases = fc.tuple(fc.constantFrom(2, 3, 4), fc.constantFrom(1, 2, 3), fc.nat(2), fc.nat(1000));
    fc.assert(
      fc.property(cases, ([n, m, f, seed]) => {
        const frozen = Math.min(f, m);
        const active = m === 3 ? Math.max(m - frozen - 1, 0) : m - frozen;
        const input = problem(n, m, seed);
        const c = (spin: number, mu: number, p: number) => input.coefficients[spin][mu * m + p];
        const over = (matrix: Float64Array, left: number, p: number, right: number, q: number) => {
          let sum = 0;
          for (let i = 0; i < n; i++)
            for (let j = 0; j < n; j++) sum += c(left, i, p) * c(right, j, q) * matrix[i * n + j];
          return sum;
        };
        const g = (bra: number, p: number, q: number, ket: number, r: number, s: number) => {
          let sum = 0;
          for (let i = 0; i < n; i++)
            for (let j = 0; j < n; j++)
              for (let k = 0; k < n; k++)
                for (let l = 0; l < n; l++)
                  sum +=
                    c(bra, i, p) *
                    c(bra, j, q) *
                    c(ket, k, r) *
                    c(ket, l, s) *
                    input.repulsion[packedPair(packedPair(i, j), packedPair(k, l))];
          return sum;
        };
        const result = transformToSpinOrbitals({ ...input, frozen, active });
        const beta = result.beta!;

        let core = 0.7;
        for (const spin of [0, 1]) {
          for (let i = 0; i < frozen; i++) {
            core += over(input.oneElectron, spin, i, spin, i);
            for (const other of [0, 1]) {
              for (let j = 0; j < frozen; j++) {
                core += g(spin, i, i, other, j, j) / 2;
                if (spin === other) core -= g(spin, i, j, spin, j, i) / 2;
              }
            }
          }
        }
        expect(result.coreEnergy).toBeCloseTo(core, 10);
        expect(beta.frozen).toBe(frozen);
        const pairs = (active * (active + 1)) / 2;
        [result, beta].forEach(({ oneElectron, twoElectron }, spin) => {
          for (let p = 0; p < active; p++) {
            for (let q = 0; q < active; q++) {
              const [a, b] = [p + frozen, q + frozen];
              let field = over(input.oneElectron, spin, a, spin, b);
              for (let i = 0; i < frozen; i++) {
                field += g(spin, a, b, 0, i, i) + g(spin, a, b, 1, i, i) - g(spin, a, i, spin, i, b);
              }
              expect(oneElectron[p * active + q]).toBeCloseTo(field, 10);
              for (let r = 0; r < active; r++) {
                for (let s = 0; s < active; s++) {
                  const place = packedPair(packedPair(p, q), packedPair(r, s));
                  expect(twoElectron[place]).toBeCloseTo(g(spin, a, b, spin, r + frozen, s + frozen), 10);
                  if (spin === 1) continue;
                  const mixed = packedPair(p, q) * pairs + packedPair(r, s);
                  expect(beta.mixed[mixed]).toBeCloseTo(g(0, a, b, 1, r + frozen, s + frozen), 10);
                }
              }
            }
          }
        });
        for (let p = 0; p < m; p++) {
          for (let r = 0; r < m; r++) {
            expect(beta.overlap[p * m + r]).toBeCloseTo(over(input.overlap, 0, p, 1, r), 11);
          }
        }
      }),
      { seed: 3, numRuns: 30 },
    );
  });

  it('identity: equal orbitals give every part as the restricted transformation does', () => {
    const input = problem(5, 4, 8);
    const [coefficients] = input.coefficients;
    const window = { frozen: 1, active: 3 };
    const restricted = transformToOrbitals({ ...input, ...window, coefficients });
    const { beta, ...alpha } = transformToSpinOrbitals({
      ...input,
      ...window,
      coefficients: [coefficients, coefficients],
    });
    const expectClose = (one: Float64Array, other: Float64Array) => {
      expect(one.length).toBe(other.length);
      one.forEach((value, i) => {
        expect(Math.abs(value - other[i])).toBeLessThan(1e-11);
      });
    };
    expect(alpha.coreEnergy).toBeCloseTo(restricted.coreEnergy, 11);
    for (const part of [alpha, beta!]) {
      expectClose(part.oneElectron, restricted.oneElectron);
      expectClose(part.twoElectron, restricted.twoElectron);
    }
    for (let bra = 0; bra < 6; bra++) {
      for (let ket = 0; ket < 6; ket++) {
        const expected = restricted.twoElectron[packedPair(bra, ket)];
        expect(Math.abs(beta!.mixed[bra * 6 + ket] - expected)).toBeLessThan(1e-11);
      }
    }
  });
});
