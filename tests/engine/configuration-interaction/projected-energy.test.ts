import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { orbitalsOnlyIn } from '../../../engine/configuration-interaction/determinants';
import { hamiltonianElement } from '../../../engine/configuration-interaction/matrix-elements';
import { type PairPart, projectedEnergy } from '../../../engine/configuration-interaction/projected-energy';
import { solveConfigurationInteraction } from '../../../engine/configuration-interaction/solve';
import type { OrbitalIntegrals } from '../../../engine/integrals/orbital-integrals';
import { symmetricEigen } from '../../../engine/linear-algebra/symmetric-eigen';
import { minimalHydrogens, TEXTBOOK_HYDROGEN } from '../../support/model-hamiltonians';
import { randomOrbitalIntegrals, randomUnrestrictedIntegrals } from '../../support/random-orbital-integrals';

/** Lowest eigenvector of the whole matrix, element by element. */
function groundState(integrals: OrbitalIntegrals, alpha: number, beta: number, rank: number) {
  const space = buildDeterminantSpace(integrals.orbitalCount, alpha, beta, rank);
  const all = Array.from({ length: space.dimension }, (_, place) => determinantAt(space, place));
  const matrix = Float64Array.from({ length: all.length ** 2 }, (_, i) =>
    hamiltonianElement(all[Math.trunc(i / all.length)]!, all[i % all.length]!, integrals),
  );
  const { values, vectors } = symmetricEigen(matrix, all.length);
  const vector = Float64Array.from(all, (_, i) => vectors[i * all.length]!);
  return { space, all, vector, correlation: values[0]! - matrix[0]! };
}

const CASES = [
  ['closed shell, full CI', 4, 2, 2, Number.POSITIVE_INFINITY, false],
  ['closed shell, CISD', 5, 3, 3, 2, false],
  ['closed shell, CISDT', 5, 2, 2, 3, false],
  ['open shell', 5, 3, 1, 2, false],
  ['one electron', 4, 1, 0, 1, false],
  ['electrons of one spin', 5, 3, 0, 2, false],
  ['UHF orbitals', 5, 3, 2, 3, true],
] as const;

describe('projectedEnergy', () => {
  it.each(CASES)(
    'identity: %s: parts are ⟨0|H|I⟩ c(I)/c(0) by orbitals left, and add up to E − E(reference)',
    (_, n, alpha, beta, rank, spinsDiffer) => {
      const integrals = spinsDiffer
        ? randomUnrestrictedIntegrals(n, 5)
        : randomOrbitalIntegrals(n, 3, { coupling: 0.15 });
      const { space, all, vector, correlation } = groundState(integrals, alpha, beta, rank);
      const parts = projectedEnergy(space, vector, correlation, integrals);
      if (parts.kind === 'none') throw new Error(parts.reason);

      const expected = new Map<string, number>();
      all.forEach((determinant, place) => {
        const ofAlpha = orbitalsOnlyIn(all[0]!.alpha, determinant.alpha);
        const ofBeta = orbitalsOnlyIn(all[0]!.beta, determinant.beta);
        const left = [...ofAlpha, ...ofBeta].sort((a, b) => a - b);
        if (left.length === 0 || left.length > 2) return;
        const energy = (hamiltonianElement(all[0]!, determinant, integrals) * vector[place]!) / vector[0]!;
        const isSameSpin = left.length === 2 && ofAlpha.length !== 1;
        for (const key of [left.join(), ...(isSameSpin ? [`same ${left}`] : [])]) {
          expected.set(key, (expected.get(key) ?? 0) + energy);
        }
      });
      let sum = 0;
      for (const { orbital, energy } of parts.singles) {
        sum += energy;
        expect(Math.abs(energy - (expected.get(`${orbital}`) ?? 0))).toBeLessThan(1e-11);
      }
      for (const { orbitals, energy, sameSpin } of parts.pairs) {
        sum += energy;
        expect(Math.abs(energy - (expected.get(orbitals.join()) ?? 0))).toBeLessThan(1e-11);
        expect(Math.abs(sameSpin - (expected.get(`same ${orbitals}`) ?? 0))).toBeLessThan(1e-11);
      }
      const keys = [...expected.keys()].filter((key) => /^\d+,/.test(key));
      expect(parts.pairs.map(({ orbitals }) => orbitals.join())).toEqual(expect.arrayContaining(keys));
      expect(Math.abs(sum - correlation)).toBeLessThan(1e-12);
    },
  );

  it('identity: three H2 infinitely far apart: each pair has the energy of one alone, none is between them', () => {
    const { h11, h22, J11, J22, K12 } = TEXTBOOK_HYDROGEN;
    const half = (2 * h22 + J22 - 2 * h11 - J11) / 2;
    const alone = half - Math.hypot(half, K12);
    const integrals = minimalHydrogens(3);
    const { correlationParts } = solveConfigurationInteraction(integrals, {
      alphaElectrons: 3,
      betaElectrons: 3,
      maximumRank: Number.POSITIVE_INFINITY,
      states: 1,
      correlationParts: true,
    });
    const { projected } = correlationParts!;
    if (projected.kind === 'none') throw new Error(projected.reason);
    expect(projected.pairs).toHaveLength(6);
    for (const { orbitals, energy, sameSpin } of projected.pairs) {
      const expected = orbitals[0] === orbitals[1] ? alone : 0;
      expect(Math.abs(energy - expected)).toBeLessThan(1e-6);
      expect(Math.abs(sameSpin)).toBeLessThan(1e-9);
    }
  });

  it('identity: an iterated vector: the whole to rounding, each part as near as the residual allows', () => {
    const integrals = randomOrbitalIntegrals(7, 11, { coupling: 0.15 });
    const options = {
      alphaElectrons: 3,
      betaElectrons: 3,
      maximumRank: 3,
      states: 1,
      correlationParts: true,
    };
    const pairsOf = (residualTolerance: number): readonly PairPart[] => {
      const result = solveConfigurationInteraction(integrals, { ...options, residualTolerance });
      expect(result.iterations).toBeGreaterThan(0);
      const { total, projected } = result.correlationParts!;
      if (projected.kind === 'none') throw new Error(projected.reason);
      const sum = [...projected.singles, ...projected.pairs].reduce((all, { energy }) => all + energy, 0);
      expect(Math.abs(sum - total)).toBeLessThan(1e-12);
      return projected.pairs;
    };
    const exact = pairsOf(1e-10);
    pairsOf(1e-4).forEach(({ energy }, k) => {
      expect(Math.abs(energy - exact[k]!.energy)).toBeLessThan(1e-3);
    });
    pairsOf(1e-6).forEach(({ energy }, k) => {
      expect(Math.abs(energy - exact[k]!.energy)).toBeLessThan(1e-5);
    });
  });

  it('identity: says so where the state hardly has the reference, as of another symmetry', () => {
    const integrals = randomOrbitalIntegrals(4, 2);
    const space = buildDeterminantSpace(4, 2, 2, Number.POSITIVE_INFINITY);
    const vector = new Float64Array(space.dimension);
    vector[3] = 1;
    const parts = projectedEnergy(space, vector, 0.2, integrals);
    expect(parts).toEqual({
      kind: 'none',
      reason: expect.stringContaining('a weight below 0.01 in this state'),
    });
  });
});
