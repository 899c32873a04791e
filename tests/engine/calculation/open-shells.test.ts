import { describe, expect, it } from 'vitest';
import type { PerturbationResult, Study, StudyAtom } from '#engine';
import { prepareStudy } from '#engine';
import { atom, compute, correlated, type hartreeFock, study } from '../../support/studies';

function openShell(
  atoms: readonly StudyAtom[],
  multiplicity: number,
  changes: Partial<Study> & { charge?: number } = {},
): Study {
  const plain = study(atoms, { basis: '6-31G', levels: ['UHF', 'ROHF', 'MP2', 'CISD', 'FCI'], ...changes });
  return { ...plain, molecule: { ...plain.molecule, multiplicity } };
}

const levelEnergy = (point: ReturnType<typeof compute>, level: string) => {
  const result = point.levels[level];
  if (!result || !('energy' in result)) throw new Error(`no ${level}`);
  return result.energy;
};

describe('open shells', () => {
  it.each([
    ['O, triplet', [atom('O')], 3, 0],
    ['Li, doublet', [atom('Li')], 2, 0],
    ['BeH, doublet', [atom('Be'), atom('H', 0, 0, 2.54)], 2, 0],
    ['CH2, triplet', [atom('C'), atom('H', 1.87, 0, 0.8), atom('H', -1.87, 0, 0.8)], 3, 0],
    ['Li2+, doublet', [atom('Li'), atom('Li', 0, 0, 5.9)], 2, 1],
    ['H3, quartet', [atom('H'), atom('H', 0, 0, 2), atom('H', 0, 2, 0)], 4, 0],
  ] as const)(
    'identity: %s – UHF ≤ ROHF, FCI ≤ CISD ≤ ROHF, and FCI is a pure spin state',
    (_, atoms, multiplicity, charge) => {
      const basis = 'STO-3G';
      const point = compute(openShell(atoms, multiplicity, { charge, basis }));
      for (const level of Object.values(point.levels)) expect(level.converged).toBe(true);
      const [uhf, rohf, cisd, fci] = ['UHF', 'ROHF', 'CISD', 'FCI'].map((level) => levelEnergy(point, level));
      expect(uhf).toBeLessThanOrEqual(rohf! + 1e-9);
      expect(cisd).toBeLessThanOrEqual(rohf! + 1e-10);
      expect(fci).toBeLessThanOrEqual(cisd! + 1e-10);
      const spin = (multiplicity - 1) / 2;
      expect(Math.abs(correlated(point).sSquared - spin * (spin + 1))).toBeLessThan(1e-8);
      expect(Math.abs(correlated(point).correlation - (fci! - rohf!))).toBeLessThan(1e-12);
      expect(point.levels.UHF).toMatchObject({ kind: 'hartreeFock' });
      expect((point.levels.UHF as ReturnType<typeof hartreeFock>).sSquared!).toBeGreaterThanOrEqual(
        spin * (spin + 1) - 1e-9,
      );
    },
  );

  it('identity: H2 in its triplet state – one Hartree–Fock, and full CI equal to the triplet of the singlet’s sector', () => {
    const atoms = [atom('H'), atom('H', 0, 0, 2.2)];
    const triplet = compute(openShell(atoms, 3));
    const singletSector = compute(study(atoms, { basis: '6-31G', levels: ['FCI'], states: 6 }));
    const lowestTriplet = correlated(singletSector).states.find((state) => state.spin === 'triplet');
    expect(Math.abs(levelEnergy(triplet, 'FCI') - lowestTriplet!.energy)).toBeLessThan(1e-10);
  });

  it('identity: far apart, UHF of H2 is two hydrogen atoms, which RHF is not', () => {
    const molecule = compute(
      study([atom('H'), atom('H', 0, 0, 30)], { basis: '6-31G', levels: ['RHF', 'UHF'] }),
    );
    const single = compute(openShell([atom('H')], 2, { levels: ['UHF'] }));
    expect(Math.abs(levelEnergy(molecule, 'UHF') - 2 * levelEnergy(single, 'UHF'))).toBeLessThan(1e-9);
    expect(levelEnergy(molecule, 'RHF')).toBeGreaterThan(levelEnergy(molecule, 'UHF') + 0.1);
    expect(molecule.cautions.map((caution) => caution.code)).toEqual(
      expect.arrayContaining(['rhf.unstable', 'uhf.contaminated']),
    );
  });

  it('identity: where RHF is stable, UHF and ROHF of a closed shell are RHF', () => {
    const atoms = [atom('Li'), atom('H', 0.3, -0.4, 3)];
    const point = compute(study(atoms, { basis: '6-31G', levels: ['RHF', 'UHF', 'ROHF'] }));
    expect(Math.abs(levelEnergy(point, 'UHF') - levelEnergy(point, 'RHF'))).toBeLessThan(1e-9);
    expect(Math.abs(levelEnergy(point, 'ROHF') - levelEnergy(point, 'RHF'))).toBeLessThan(1e-9);
  });

  it('identity: MP2 says what it is built on, and its parts add up', () => {
    const closed = compute(
      study([atom('H'), atom('F', 0, 0, 1.73)], { basis: '6-31G', levels: ['RHF', 'MP2'] }),
    );
    const open = compute(openShell([atom('O'), atom('H', 0, 0, 1.83)], 2, { levels: ['UHF', 'MP2'] }));
    for (const [point, reference] of [
      [closed, 'RHF'],
      [open, 'UHF'],
    ] as const) {
      const second = point.levels.MP2 as PerturbationResult;
      expect(second.reference).toBe(reference);
      const sum = levelEnergy(point, reference) + second.sameSpin + second.oppositeSpin;
      expect(Math.abs(second.energy - sum)).toBeLessThan(1e-12);
    }
  });

  it('identity: RHF and CIS of an open shell are refused, at their place and with what to ask for', () => {
    const request = openShell([atom('O'), atom('H', 0, 0, 1.83)], 2, { levels: ['ROHF', 'RHF'] });
    const preparation = prepareStudy(request);
    if (preparation.ok) throw new Error('not refused');
    expect(preparation.errors).toMatchObject([{ code: 'level.needsClosedShell', place: 'levels[1]' }]);
    expect(preparation.errors[0]!.remedy).toContain('UHF');
  });
});
