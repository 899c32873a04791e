import { describe, expect, it } from 'vitest';
import { basisSetLimit, type StudyInBasis } from '#engine';

/** A study whose energies are made up. */
function made(name: string, levels: Readonly<Record<string, StudyInBasis['levels'][string]>>): StudyInBasis {
  return {
    basis: { name, harmonics: 'spherical', functions: 1, shells: {}, citations: [], notes: [] },
    levels,
    findings: {},
    cautions: [],
  };
}

const NAMES = ['cc-pVDZ', 'cc-pVTZ', 'cc-pVQZ'];

/** Energies that fall as theory has it to −1 − 0.1·p for Hartree–Fock, and to −0.2 beyond, at points p = 0, 1, 2. */
function family(names: readonly string[] = NAMES): StudyInBasis[] {
  return names.map((name) => {
    const x = NAMES.indexOf(name) + 2;
    const meanField = [0, 1, 2].map((p) => -1 - 0.1 * p + (0.3 + 0.05 * p) * Math.exp(-1.63 * x));
    const correlation = [0, 1, 2].map((p) => -0.2 + (0.1 + 0.02 * p) * x ** -3);
    return made(name, {
      RHF: { energies: meanField },
      FCI: { energies: meanField.map((energy, p) => energy + correlation[p]!), correlation },
    });
  });
}

function limitOf(studies: readonly StudyInBasis[]) {
  const limit = basisSetLimit(studies);
  if (limit.kind !== 'found') throw new Error(limit.reason);
  return limit;
}

describe('basisSetLimit', () => {
  it('identity: energies that follow the formulas give their limit at every point, in any order of bases', () => {
    const { levels, family: name, members } = limitOf(family().reverse());
    expect(name).toBe('cc-pVXZ');
    expect(members.map(({ cardinal }) => cardinal)).toEqual([2, 3, 4]);
    expect(levels.RHF?.hartreeFock).toEqual({ formula: 'exponential', cardinals: [3, 4] });
    expect(levels.FCI?.correlation).toEqual({ formula: 'inverseCube', cardinals: [3, 4] });
    for (const p of [0, 1, 2]) {
      expect(levels.RHF?.energies[p]?.value).toBeCloseTo(-1 - 0.1 * p, 12);
      expect(levels.FCI?.energies[p]?.value).toBeCloseTo(-1.2 - 0.1 * p, 12);
    }
  });

  it('identity: the uncertainty is at least all that extrapolation added to Hartree–Fock, a third with correlation', () => {
    const studies = family();
    const { levels } = limitOf(studies);
    for (const [level, fraction] of [
      ['RHF', 1],
      ['FCI', 1 / 3],
    ] as const) {
      const limit = levels[level]?.energies[0];
      const largest = studies[2]?.levels[level]?.energies[0];
      if (!limit || largest == null) throw new Error('no limit');
      expect(limit.uncertainty).toBeGreaterThanOrEqual(fraction * Math.abs(limit.value - largest) - 1e-15);
    }
    const fromSmaller = limitOf(family(['cc-pVDZ', 'cc-pVTZ'])).levels.FCI?.energies[0];
    const limit = levels.FCI?.energies[0]?.value ?? Number.NaN;
    expect(Math.abs((fromSmaller?.value ?? 0) - limit)).toBeLessThan(fromSmaller?.uncertainty ?? 0);
  });

  it('identity: a formula that fails at one point of a curve serves at none, not even for the uncertainty', () => {
    // steps of 0.1 and 0.09: an exponential through all three goes far beyond; growing steps have none
    const slow = [-1, -1.1, -1.19];
    const growing = [-1, -2, -5];
    const uncertaintyOf = (...curve: readonly (readonly number[])[]) => {
      const studies = family().map((study, k) => ({
        ...study,
        levels: { RHF: { energies: curve.map((place) => place[k]!) } },
      }));
      return limitOf(studies).levels.RHF?.energies[0]?.uncertainty;
    };
    expect(uncertaintyOf(slow)).toBeGreaterThan(0.3);
    expect(uncertaintyOf(slow, growing)).toBeLessThan(0.1);
  });

  it('identity: a point missing in one basis has no limit, a level missing in one has none at all', () => {
    const studies = family().map((study, k) =>
      k === 1
        ? {
            ...study,
            levels: {
              ...study.levels,
              RHF: { energies: [null, ...(study.levels.RHF?.energies.slice(1) ?? [])] },
            },
          }
        : study,
    );
    expect(limitOf(studies).levels.RHF?.energies.map((limit) => limit === null)).toEqual([
      true,
      false,
      false,
    ]);
    const failed = family().map((study) => ({
      ...study,
      levels: { ...study.levels, RHF: { energies: [null, null, null] } },
    }));
    expect(Object.keys(limitOf(failed).levels)).toEqual(['FCI']);
  });

  it('identity: sets of different kinds are not extrapolated, and those that do not belong are named', () => {
    const [double] = family(['cc-pVDZ']);
    const limit = basisSetLimit([made('STO-3G', {}), made('6-31G', {}), double!, made('aug-cc-pVTZ', {})]);
    expect(limit).toMatchObject({ kind: 'none' });
    expect(limit.kind === 'none' && limit.reason).toMatch(/^STO-3G, 6-31G are no members/);
    const twice = basisSetLimit([double!, double!]);
    expect(twice.kind).toBe('none');
  });
});
