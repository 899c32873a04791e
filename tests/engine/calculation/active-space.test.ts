import { describe, expect, it } from 'vitest';
import { prepareStudy } from '#engine';
import { atom, compute, correlated, hartreeFock, prepare, study, waterAtoms } from '../../support/studies';

const lithiumHydride = [atom('Li'), atom('H', 0, 0, 3.1)];
const oxygen = [atom('O'), atom('O', 0, 0, 2.3)];

describe('active orbitals', () => {
  it('identity: all electrons in all orbitals are full CI', () => {
    const all = correlated(compute(study(lithiumHydride, { levels: ['FCI'] })));
    const named = correlated(
      compute(study(lithiumHydride, { levels: ['FCI'], active: { electrons: 4, orbitals: 6 } })),
    );
    expect(named.determinants).toBe(all.determinants);
    expect(Math.abs(named.energy - all.energy)).toBeLessThan(1e-11);
  });

  it('identity: all but the core electrons in all orbitals above the core are a frozen core', () => {
    for (const level of ['CISD', 'FCI']) {
      const frozen = compute(study(waterAtoms(1.85, 104), { levels: [level], frozenCore: true }));
      const active = compute(
        study(waterAtoms(1.85, 104), { levels: [level], active: { electrons: 8, orbitals: 6 } }),
      );
      const [one, other] = [correlated(frozen, level), correlated(active, level)];
      expect(Math.abs(one.energy - other.energy)).toBeLessThan(1e-11);
      one.dipole.forEach((component, axis) => {
        expect(Math.abs(component - other.dipole[axis])).toBeLessThan(1e-7);
      });
      expect(Math.abs(one.energyParts!.virialRatio - other.energyParts!.virialRatio)).toBeLessThan(1e-7);
    }
  });

  it('identity: as many orbitals as the reference fills leave the reference, paired or not', () => {
    const closed = compute(
      study(waterAtoms(1.85, 104), { levels: ['RHF', 'FCI'], active: { electrons: 4, orbitals: 2 } }),
    );
    expect(correlated(closed).determinants).toBe(1);
    expect(Math.abs(correlated(closed).energy - hartreeFock(closed).energy)).toBeLessThan(1e-9);
    const open = compute({
      ...study(oxygen, { levels: ['ROHF', 'FCI'], active: { electrons: 2, orbitals: 2 } }),
      molecule: { unit: 'bohr', atoms: oxygen, multiplicity: 3 },
    });
    expect(Math.abs(correlated(open).energy - (open.levels.ROHF as { energy: number }).energy)).toBeLessThan(
      1e-9,
    );
    expect(correlated(open).sSquared).toBeCloseTo(2, 10);
  });

  it('identity: a larger window never gives a higher full-CI energy, in 6-31G with orbitals left empty', () => {
    const energies = [2, 4, 7, 10].map((orbitals) => {
      const point = compute(
        study(lithiumHydride, { levels: ['FCI'], basis: '6-31G', active: { electrons: 2, orbitals } }),
      );
      const { naturalOccupations } = correlated(point);
      expect(naturalOccupations.reduce((sum, value) => sum + value, 0)).toBeCloseTo(4, 10);
      return correlated(point).energy;
    });
    energies.forEach((energy, k) => {
      if (k > 0) expect(energy).toBeLessThanOrEqual(energies[k - 1] + 1e-11);
    });
    expect(energies[3]).toBeLessThan(energies[0] - 1e-3);
  });

  it('identity: H2 pulled apart in its two orbitals ends in two atoms', () => {
    const basis = '6-31G';
    const apart = compute(
      study([atom('H'), atom('H', 0, 0, 60)], {
        levels: ['FCI'],
        basis,
        active: { electrons: 2, orbitals: 2 },
      }),
    );
    const all = compute(study([atom('H'), atom('H', 0, 0, 60)], { levels: ['FCI'], basis }));
    expect(correlated(apart).energy).toBeGreaterThan(correlated(all).energy - 1e-10);
    expect(correlated(apart).naturalOccupations[1]).toBeCloseTo(1, 6);
  });

  it.each([
    [{ electrons: 3, orbitals: 4 }, {}, 'active.electrons'],
    [{ electrons: 6, orbitals: 4 }, {}, 'active.electrons'],
    [{ electrons: 2, orbitals: 9 }, {}, 'active.orbitals'],
    [{ electrons: 4, orbitals: 1 }, {}, 'active.orbitals'],
    [{ electrons: 2, orbitals: 2 }, { frozenCore: true }, 'active'],
    [{ electrons: 2, orbitals: 2 }, { levels: ['MP2'] }, 'active'],
  ])('identity: %o with %o is refused at its place', (active, changes, place) => {
    const preparation = prepareStudy(study(lithiumHydride, { levels: ['FCI'], active, ...changes }));
    expect(preparation.ok).toBe(false);
    if (!preparation.ok)
      expect(preparation.errors.map((error) => [error.code, error.place])).toEqual([['study.active', place]]);
  });

  it('identity: the sizes announced are those of the window', () => {
    const prepared = prepare(
      study(lithiumHydride, { levels: ['FCI'], active: { electrons: 2, orbitals: 3 } }),
    );
    expect([prepared.frozenOrbitals, prepared.activeOrbitals]).toEqual([1, 3]);
  });
});
