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

  it.each([
    ['N', 'O', 2, 2.4],
    ['B', 'F', 1, 3.2],
  ])(
    'identity: %s–%s, multiplicity %i, at %d Å: of four states the lowest two are those of two',
    (one, other, multiplicity, distance) => {
      const of = (states: number) => {
        const { molecule, ...rest } = study([atom(one), atom(other, 0, 0, distance)], { unit: 'angstrom' });
        const request: Study = {
          ...rest,
          molecule: { ...molecule, multiplicity },
          levels: [multiplicity === 1 ? 'RHF' : 'ROHF', 'FCI'],
          states,
          frozenCore: true,
        };
        const result = correlated(computePoint(prepare(request), null).result, 'FCI');
        expect(result.converged).toBe(true);
        return (result.states ?? []).map(({ energy }) => energy);
      };
      const two = of(2);
      of(4)
        .slice(0, 2)
        .forEach((energy, k) => {
          expect(Math.abs(energy - two[k])).toBeLessThan(1e-9);
        });
    },
  );
});
