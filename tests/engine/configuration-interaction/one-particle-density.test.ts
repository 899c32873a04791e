import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
  transposeInto,
} from '../../../engine/configuration-interaction/determinant-space';
import { occupiedOrbitals } from '../../../engine/configuration-interaction/determinants';
import {
  naturalOrbitals,
  spinDensities,
  spinSummed,
} from '../../../engine/configuration-interaction/one-particle-density';
import { solveSingles } from '../../../engine/configuration-interaction/singles';
import { solveConfigurationInteraction } from '../../../engine/configuration-interaction/solve';
import { congruence, dot } from '../../../engine/linear-algebra/dense';
import { closedShellOrbitals } from '../../support/closed-shell-orbitals';
import { bruteOneElectron } from '../../support/operator-algebra';
import { randomArray, randomSymmetric, seededRandom } from '../../support/random';
import { randomOrbitalIntegrals } from '../../support/random-orbital-integrals';

const CASES = [
  [4, 2, 2, Number.POSITIVE_INFINITY],
  [5, 2, 2, 2],
  [5, 3, 2, 2],
  [6, 3, 3, 2],
  [5, 4, 1, 2],
  [5, 0, 2, 2],
  [5, 1, 3, 3],
] as const;

function randomState(n: number, alpha: number, beta: number, rank: number) {
  const space = buildDeterminantSpace(n, alpha, beta, rank);
  const vector = randomArray(space.dimension, seededRandom(n + alpha));
  const norm = Math.sqrt(dot(vector, vector));
  return { space, vector: vector.map((value) => value / norm) };
}

describe('spinDensities', () => {
  it.each(CASES)(
    'identity: %i orbitals, %i + %i electrons, rank %d: equals operator algebra',
    (n, alpha, beta, rank) => {
      const { space, vector } = randomState(n, alpha, beta, rank);
      const [ofAlpha, ofBeta] = spinDensities(space, vector, vector);
      const determinants = Array.from(vector, (_, place) => {
        const determinant = determinantAt(space, place);
        return { alpha: occupiedOrbitals(determinant.alpha), beta: occupiedOrbitals(determinant.beta) };
      });
      for (const pair of [0, 1, n + 3, 2 * n + 1, 3 * n, n * n - 1]) {
        const operator = new Float64Array(n * n);
        operator[pair] = 1;
        const nothing = new Float64Array(n * n);
        let [inAlpha, inBeta] = [0, 0];
        determinants.forEach((left, i) => {
          determinants.forEach((right, j) => {
            inAlpha += vector[i] * vector[j] * bruteOneElectron(left, right, operator, n, nothing);
            inBeta += vector[i] * vector[j] * bruteOneElectron(left, right, nothing, n, operator);
          });
        });
        expect(ofAlpha[pair]).toBeCloseTo(inAlpha, 12);
        expect(ofBeta[pair]).toBeCloseTo(inBeta, 12);
      }
    },
  );

  it.each([3, Number.POSITIVE_INFINITY])(
    'identity: rank %d: densities of and between vectors with a parity under the exchange of spins add up to those without',
    (rank) => {
      const { space, vector } = randomState(5, 3, 3, rank);
      const turned = new Float64Array(vector.length);
      transposeInto(space, vector, turned);
      const even = vector.map((value, i) => (value + turned[i]) / 2);
      const odd = vector.map((value, i) => (value - turned[i]) / 2);
      const parts = [spinDensities(space, even, even), spinDensities(space, odd, odd)];
      const between = spinDensities(space, even, odd);
      spinDensities(space, vector, vector).forEach((density, spin) => {
        expect(Math.max(...between[spin].map(Math.abs))).toBeGreaterThan(0.01);
        density.forEach((value, pair) => {
          const sum = parts[0][spin][pair] + parts[1][spin][pair] + 2 * between[spin][pair];
          expect(Math.abs(value - sum)).toBeLessThan(1e-13);
        });
      });
    },
  );

  it.each(CASES)(
    'identity: %i orbitals, %i + %i electrons, rank %d: trace, symmetry, natural occupations from 2 to 0',
    (n, alpha, beta, rank) => {
      const { space, vector } = randomState(n, alpha, beta, rank);
      const density = spinSummed(spinDensities(space, vector, vector));
      const { values, vectors } = naturalOrbitals(density, n);
      let trace = 0;
      for (let p = 0; p < n; p++) trace += density[p * n + p];
      expect(trace).toBeCloseTo(alpha + beta, 12);
      const diagonal = congruence(density, vectors, n, n);
      for (let p = 0; p < n; p++) {
        for (let q = 0; q < n; q++) {
          expect(density[p * n + q]).toBe(density[q * n + p]);
          expect(diagonal[p * n + q]).toBeCloseTo(p === q ? values[p] : 0, 12);
        }
        expect(values[p]).toBeGreaterThan(-1e-12);
        expect(values[p]).toBeLessThan(2 + 1e-12);
        if (p > 0) expect(values[p]).toBeLessThanOrEqual(values[p - 1]);
      }
    },
  );
});

describe('spinDensities between two states', () => {
  it.each(CASES)(
    'identity: %i orbitals, %i + %i electrons, rank %d: equals operator algebra',
    (n, alpha, beta, rank) => {
      const { space, vector } = randomState(n, alpha, beta, rank);
      const other = randomArray(space.dimension, seededRandom(77));
      const density = spinSummed(spinDensities(space, other, vector));
      const determinants = Array.from(vector, (_, place) => {
        const determinant = determinantAt(space, place);
        return { alpha: occupiedOrbitals(determinant.alpha), beta: occupiedOrbitals(determinant.beta) };
      });
      const operator = randomSymmetric(n, seededRandom(3));
      let expected = 0;
      determinants.forEach((left, i) => {
        determinants.forEach((right, j) => {
          expected += other[i] * vector[j] * bruteOneElectron(left, right, operator, n);
        });
      });
      expect(dot(density, operator)).toBeCloseTo(expected, 11);
    },
  );

  it('independent: CI of rank 1 on a closed shell has the transition moments of CIS', () => {
    const n = 6;
    const integrals = closedShellOrbitals(randomOrbitalIntegrals(n, 26, { coupling: 0.1 }), 3);
    const dipole = [1, 2, 3].map((seed) => randomSymmetric(n, seededRandom(seed)));
    const singles = solveSingles(integrals, { occupied: 3, states: 3, dipole, residualTolerance: 1e-9 });
    const { states } = solveConfigurationInteraction(integrals, {
      alphaElectrons: 3,
      betaElectrons: 3,
      maximumRank: 1,
      states: 7,
    });
    let bright = 0;
    for (const { energy, spin, transitionDipole } of singles.states) {
      const same = states.find((state) => Math.abs(state.energy - energy) < 1e-8 && state.spin === spin);
      if (!same?.transitionDensity) continue;
      const sign = Math.sign(-dot(same.transitionDensity, dipole[0]) * transitionDipole[0]) || 1;
      transitionDipole.forEach((moment, axis) => {
        expect(Math.abs(-sign * dot(same.transitionDensity!, dipole[axis]) - moment)).toBeLessThan(1e-7);
      });
      if (spin === 'singlet') bright++;
    }
    expect(bright).toBeGreaterThan(1);
  });
});
