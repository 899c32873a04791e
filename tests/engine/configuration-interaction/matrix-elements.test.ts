import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { occupationString } from '../../../engine/configuration-interaction/determinants';
import {
  hamiltonianElement,
  oneElectronElement,
  spinSquaredElement,
} from '../../../engine/configuration-interaction/matrix-elements';
import {
  allOccupations,
  bruteHamiltonian,
  bruteOneElectron,
  bruteSpinSquared,
  type Occupation,
} from '../../support/operator-algebra';
import { randomSymmetric, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals, randomUnrestrictedIntegrals } from '../../support/random-orbital-integrals';

const asDeterminant = (n: number, { alpha, beta }: Occupation) => ({
  alpha: occupationString(n, alpha),
  beta: occupationString(n, beta),
});

/** Two determinants over n orbitals with the same electron counts. */
const determinantPair = (n: number) =>
  fc
    .tuple(fc.integer({ min: 0, max: n }), fc.integer({ min: 0, max: n }))
    .chain(([alphaCount, betaCount]) => {
      const occupied = (count: number) =>
        fc
          .uniqueArray(fc.nat(n - 1), { minLength: count, maxLength: count })
          .map((p) => p.sort((a, b) => a - b));
      const determinant = fc.record({ alpha: occupied(alphaCount), beta: occupied(betaCount) });
      return fc.tuple(determinant, determinant);
    });

describe('matrix elements between determinants', () => {
  it('identity: every element over 4 orbitals equals operator algebra, all electron counts', () => {
    const n = 4;
    const integrals = randomOrbitalIntegrals(n, 11);
    let compared = 0;
    for (let alpha = 0; alpha <= n; alpha++) {
      for (let beta = 0; beta <= n; beta++) {
        const determinants = allOccupations(n, alpha, beta, Number.POSITIVE_INFINITY);
        for (const left of determinants) {
          for (const right of determinants) {
            const element = hamiltonianElement(asDeterminant(n, left), asDeterminant(n, right), integrals);
            expect(Math.abs(element - bruteHamiltonian(left, right, integrals))).toBeLessThan(1e-12);
            compared++;
          }
        }
      }
    }
    expect(compared).toBe(70 * 70);
  });

  it('identity: H, a one-electron operator and S² equal operator algebra for random determinants', () => {
    const n = 6;
    const operator = randomSymmetric(n, seededRandom(3));
    fc.assert(
      fc.property(determinantPair(n), fc.nat(1000), ([left, right], seed) => {
        const integrals = randomOrbitalIntegrals(n, seed);
        const bra = asDeterminant(n, left);
        const ket = asDeterminant(n, right);
        expect(hamiltonianElement(bra, ket, integrals)).toBeCloseTo(
          bruteHamiltonian(left, right, integrals),
          11,
        );
        expect(oneElectronElement(bra, ket, operator, n)).toBeCloseTo(
          bruteOneElectron(left, right, operator, n),
          12,
        );
        expect(spinSquaredElement(bra, ket)).toBeCloseTo(bruteSpinSquared(left, right, n), 12);
      }),
      { seed: 20, numRuns: 200 },
    );
  });

  it('identity: H over alpha and beta orbitals that differ equals operator algebra', () => {
    const n = 5;
    let moved = 0;
    fc.assert(
      fc.property(determinantPair(n), fc.nat(1000), ([left, right], seed) => {
        const integrals = randomUnrestrictedIntegrals(n, seed);
        const element = hamiltonianElement(asDeterminant(n, left), asDeterminant(n, right), integrals);
        expect(element).toBeCloseTo(bruteHamiltonian(left, right, integrals), 11);
        if (element !== 0) moved++;
      }),
      { seed: 21, numRuns: 300 },
    );
    expect(moved).toBeGreaterThan(100);
  });

  it('identity: the same across the borders of 32-bit words, 70 orbitals', () => {
    const n = 70;
    const integrals = randomOrbitalIntegrals(n, 5);
    const occupied = fc
      .uniqueArray(fc.constantFrom(0, 1, 30, 31, 32, 33, 61, 62, 63, 64, 65, 69), {
        minLength: 3,
        maxLength: 3,
      })
      .map((p) => p.sort((a, b) => a - b));
    const determinant = fc.record({ alpha: occupied, beta: occupied });
    let nonZero = 0;
    fc.assert(
      fc.property(
        determinant,
        fc.boolean(),
        fc.nat(2),
        fc.nat(2),
        fc.constantFrom(2, 31, 34, 63, 68),
        (left, isAlpha, i, j, to) => {
          // a neighbour of the left determinant, so that few elements vanish
          const move = (orbitals: readonly number[], k: number) =>
            orbitals.includes(to)
              ? [...orbitals]
              : orbitals.map((p, at) => (at === k ? to : p)).sort((a, b) => a - b);
          const right = isAlpha
            ? { alpha: move(left.alpha, i), beta: move(left.beta, j) }
            : { alpha: left.alpha, beta: move(left.beta, j) };
          const expected = bruteHamiltonian(left, right, integrals);
          const element = hamiltonianElement(asDeterminant(n, left), asDeterminant(n, right), integrals);
          expect(element).toBeCloseTo(expected, 11);
          if (expected !== 0) nonZero++;
        },
      ),
      { seed: 7, numRuns: 150 },
    );
    expect(nonZero).toBeGreaterThan(100);
  });
});
