import { describe, expect, it } from 'vitest';
import type { Study } from '#engine';
import { computePoint } from '#engine';
import { atom, correlated, prepare, study } from '../../support/studies';

/**
 * Nitrogen atoms 6.3 bohr apart, whose quartets couple to a singlet, a triplet, a quintet and a septet within 0.4 mEh.
 * The RHF orbitals there have broken the symmetry of the molecule, so that no block of H shows it.
 */
function separatedNitrogen(states: number) {
  const request: Study = {
    ...study([atom('N'), atom('N', 0, 0, 6.3)], {
      unit: 'bohr',
      levels: ['FCI'],
      states,
      frozenCore: true,
    }),
  };
  return correlated(computePoint(prepare(request), null).result, 'FCI');
}

describe('states of a strongly mixed space, spin by spin', () => {
  const lowest = separatedNitrogen(1);
  const four = separatedNitrogen(4);

  it('identity: the lowest state is the same whether one or four are asked for', () => {
    expect(lowest.converged).toBe(true);
    expect(lowest.spin).toBe('singlet');
    expect(Math.abs(lowest.energy - four.energy)).toBeLessThan(1e-9);
  });

  it('independent: separate quartets couple as two spins with one exchange constant, E(S) = E(0) + J·S(S + 1)', () => {
    const states = four.states ?? [];
    expect(states.map(({ spin }) => spin)).toEqual(['singlet', 'triplet', 'quintet', 'septet']);
    const [singlet, triplet, quintet, septet] = states.map(({ energy }) => energy);
    const exchange = (triplet - singlet) / 2;
    expect(exchange).toBeGreaterThan(0);
    // the next term of the coupling, in the square of S·S, is small where the atoms hardly overlap
    expect((quintet - singlet) / exchange / 6).toBeCloseTo(1, 2);
    expect((septet - singlet) / exchange / 12).toBeCloseTo(1, 2);
  });
});
