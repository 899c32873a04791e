import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { occupationString, occupiedOrbitals } from '../../../engine/configuration-interaction/determinants';
import { applySpinSquared } from '../../../engine/configuration-interaction/spin';
import {
  applyUnrestrictedSpinSquared,
  unrestrictedSpin,
  unrestrictedSpinSquaredElement,
} from '../../../engine/configuration-interaction/unrestricted-spin';
import { dot } from '../../../engine/linear-algebra/dense';
import {
  allOccupations,
  bruteUnrestrictedSpinSquared,
  type Occupation,
} from '../../support/operator-algebra';
import { randomArray, seededRandom } from '../../support/random';
import { randomUnrestrictedIntegrals } from '../../support/random-orbital-integrals';

const spinCase = (seed: number, n: number, electrons: readonly [number, number], frozen = 0, empty = 0) => {
  const beta = randomUnrestrictedIntegrals(n, seed, { frozen, empty }).beta!;
  return { beta, spin: unrestrictedSpin(beta, n, electrons) };
};

describe('unrestrictedSpinSquaredElement', () => {
  it.each([
    [4, 2, 2, 0, 0],
    [4, 3, 1, 0, 0],
    [3, 2, 1, 1, 0],
    [3, 1, 1, 1, 1],
    [2, 1, 1, 2, 1],
    [3, 0, 2, 1, 0],
  ])(
    'identity: %i orbitals, %i + %i electrons above %i frozen orbitals, %i empty: equals operator algebra',
    (n, alpha, betaElectrons, frozen, empty) => {
      const { beta, spin } = spinCase(31, n, [alpha, betaElectrons], frozen, empty);
      const m = frozen + n + empty;
      const core = Array.from({ length: frozen }, (_, f) => f);
      const whole = (occupation: Occupation) => ({
        alpha: [...core, ...occupation.alpha.map((p) => p + frozen)],
        beta: [...core, ...occupation.beta.map((p) => p + frozen)],
      });
      const determinants = allOccupations(n, alpha, betaElectrons, Number.POSITIVE_INFINITY);
      for (const left of determinants) {
        for (const right of determinants) {
          const [bra, ket] = [left, right].map((occupation) => ({
            alpha: occupationString(n, occupation.alpha),
            beta: occupationString(n, occupation.beta),
          }));
          const expected = bruteUnrestrictedSpinSquared(whole(left), whole(right), beta.overlap, m);
          expect(Math.abs(unrestrictedSpinSquaredElement(bra, ket, spin) - expected)).toBeLessThan(1e-12);
        }
      }
    },
  );
});

describe('applyUnrestrictedSpinSquared', () => {
  it('identity: equals the sum over matrix elements for any electron counts, ranks and frozen orbitals', () => {
    const cases = fc
      .integer({ min: 1, max: 5 })
      .chain((n) =>
        fc.tuple(
          fc.constant(n),
          fc.integer({ min: 0, max: n }),
          fc.integer({ min: 0, max: n }),
          fc.constantFrom(1, 2, 3, Number.POSITIVE_INFINITY),
          fc.nat(2),
          fc.nat(10_000),
        ),
      );
    fc.assert(
      fc.property(cases, ([n, alpha, betaElectrons, rank, frozen, seed]) => {
        const { spin } = spinCase(seed, n, [alpha, betaElectrons], frozen);
        const space = buildDeterminantSpace(n, alpha, betaElectrons, rank);
        const vector = randomArray(space.dimension, seededRandom(seed + 7));
        const product = new Float64Array(space.dimension).fill(Number.NaN);
        applyUnrestrictedSpinSquared(space, spin, vector, product);
        const determinants = Array.from({ length: space.dimension }, (_, place) =>
          determinantAt(space, place),
        );
        determinants.forEach((left, i) => {
          const expected = determinants.reduce(
            (sum, right, j) => sum + unrestrictedSpinSquaredElement(left, right, spin) * vector[j],
            0,
          );
          expect(Math.abs(product[i] - expected)).toBeLessThan(1e-11);
        });
      }),
      { seed: 12, numRuns: 80 },
    );
  });

  it('identity: with equal orbitals it is S² of equal orbitals', () => {
    const n = 5;
    const overlap = new Float64Array(n * n);
    for (let p = 0; p < n; p++) overlap[p * n + p] = 1;
    const { beta } = spinCase(1, n, [3, 2]);
    const spin = unrestrictedSpin({ ...beta, overlap }, n, [3, 2]);
    const space = buildDeterminantSpace(n, 3, 2, 3);
    const vector = randomArray(space.dimension, seededRandom(4));
    const [one, other] = [new Float64Array(space.dimension), new Float64Array(space.dimension)];
    applyUnrestrictedSpinSquared(space, spin, vector, one);
    applySpinSquared(space, vector, other);
    one.forEach((value, i) => {
      expect(Math.abs(value - other[i])).toBeLessThan(1e-12);
    });
  });

  it('identity: of a single determinant M(M + 1) + N(β) less the squared overlaps of occupied orbitals', () => {
    const n = 5;
    const { beta, spin } = spinCase(17, n, [2, 2], 1);
    const space = buildDeterminantSpace(n, 2, 2, 2);
    const vector = new Float64Array(space.dimension);
    vector[0] = 1;
    const product = new Float64Array(space.dimension);
    applyUnrestrictedSpinSquared(space, spin, vector, product);
    const reference = determinantAt(space, 0);
    expect(occupiedOrbitals(reference.alpha)).toEqual([0, 1]);
    let expected = 3;
    for (let p = 0; p < 3; p++) for (let r = 0; r < 3; r++) expected -= beta.overlap[p * (n + 1) + r] ** 2;
    expect(dot(vector, product)).toBeCloseTo(expected, 12);
  });
});
