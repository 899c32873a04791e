import { describe, expect, it } from 'vitest';
import {
  buildDeterminantSpace,
  determinantAt,
} from '../../../engine/configuration-interaction/determinant-space';
import { isOccupied } from '../../../engine/configuration-interaction/determinants';
import {
  spinAveragedDiagonal,
  unrestrictedDiagonal,
} from '../../../engine/configuration-interaction/diagonal';
import { hamiltonianElement } from '../../../engine/configuration-interaction/matrix-elements';
import { randomOrbitalIntegrals, randomUnrestrictedIntegrals } from '../../support/random-orbital-integrals';

describe('spinAveragedDiagonal', () => {
  it.each([
    [5, 2, 2],
    [5, 3, 2],
    [6, 4, 1],
  ])(
    'identity: %i orbitals, %i + %i electrons: the mean of ⟨D|H|D⟩ over determinants of one configuration',
    (n, alpha, beta) => {
      const integrals = randomOrbitalIntegrals(n, 17);
      const space = buildDeterminantSpace(n, alpha, beta, Number.POSITIVE_INFINITY);
      const averaged = spinAveragedDiagonal(space, integrals);
      const byConfiguration = new Map<string, { place: number; energy: number }[]>();
      for (let place = 0; place < space.dimension; place++) {
        const determinant = determinantAt(space, place);
        const configuration = Array.from(
          { length: n },
          (_, p) => Number(isOccupied(determinant.alpha, p)) + Number(isOccupied(determinant.beta, p)),
        ).join('');
        const energy = hamiltonianElement(determinant, determinant, integrals);
        byConfiguration.set(configuration, [
          ...(byConfiguration.get(configuration) ?? []),
          { place, energy },
        ]);
      }
      for (const members of byConfiguration.values()) {
        const mean = members.reduce((sum, { energy }) => sum + energy, 0) / members.length;
        for (const { place } of members) expect(averaged[place]).toBeCloseTo(mean, 12);
      }
    },
  );
});

describe('unrestrictedDiagonal', () => {
  it.each([
    [5, 2, 2, Number.POSITIVE_INFINITY],
    [6, 4, 1, 3],
    [5, 0, 2, 2],
  ])(
    'identity: %i orbitals, %i + %i electrons, rank %d: ⟨D|H|D⟩ of every determinant',
    (n, alpha, beta, rank) => {
      const integrals = randomUnrestrictedIntegrals(n, 23);
      const space = buildDeterminantSpace(n, alpha, beta, rank);
      unrestrictedDiagonal(space, integrals).forEach((value, place) => {
        const determinant = determinantAt(space, place);
        expect(value).toBeCloseTo(hamiltonianElement(determinant, determinant, integrals), 11);
      });
    },
  );
});
