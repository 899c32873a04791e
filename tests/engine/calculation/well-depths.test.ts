import { describe, expect, it } from 'vitest';
import { computePoint, type StudyAtom } from '#engine';
import { dissociationLimit } from '../../../engine/calculation/fragments';
import { groundEnergy } from '../../../engine/calculation/level-curve';
import { atom, prepare, study } from '../../support/studies';

/** At one distance near the minimum, bohr. */
function depthsOf(atoms: readonly StudyAtom[], basis: string, levels: readonly string[], frozenCore = false) {
  const distance = atoms[1]!.at[2];
  const scan = { coordinate: { bonds: [[0, 1]] }, values: [distance] } as const;
  const prepared = prepare(study(atoms, { basis, levels, frozenCore, scan }));
  const { result } = computePoint(prepared, distance);
  return Object.fromEntries(
    levels.map((level) => {
      const energy = groundEnergy(result.levels[level]);
      const limit = dissociationLimit(prepared, level, { x: distance, energy: energy ?? Number.NaN });
      if (limit?.kind !== 'found' || energy === undefined) throw new Error(`no depth at ${level}`);
      return [level, { depth: limit.energy - energy, energy, limit: limit.energy }];
    }),
  );
}

const H2 = [atom('H'), atom('H', 0, 0, 1.389)];
const LiH = [atom('Li'), atom('H', 0, 0, 3)];
const HF = [atom('F'), atom('H', 0, 0, 1.807)];
const N2 = [atom('N'), atom('N', 0, 0, 2.143)];
const LEVELS = ['RHF', 'CISD', 'FCI'] as const;

describe('well depths', () => {
  it('identity: two electrons, or two outside a frozen core, have singles and doubles and nothing else', () => {
    for (const [atoms, basis, frozenCore] of [
      [H2, 'STO-3G', false],
      [H2, '6-31G', false],
      [LiH, 'STO-3G', true],
      [LiH, '6-31G', true],
    ] as const) {
      const { RHF, CISD, FCI } = depthsOf(atoms, basis, LEVELS, frozenCore);
      expect(CISD?.depth).toBeCloseTo(FCI?.depth ?? Number.NaN, 9);
      // a fragment of at most one electron has no correlation, so that it all deepens the well
      expect((FCI?.depth ?? 0) - (RHF?.depth ?? 0)).toBeCloseTo((RHF?.energy ?? 0) - (FCI?.energy ?? 0), 9);
      expect(FCI?.depth).toBeGreaterThan(RHF?.depth ?? Number.NaN);
    }
  });

  it('identity: of HF in STO-3G one orbital is empty, of F none, so that CISD is full CI and F has no correlation', () => {
    const { RHF, CISD, FCI } = depthsOf(HF, 'STO-3G', LEVELS);
    expect(CISD?.energy).toBeCloseTo(FCI?.energy ?? Number.NaN, 9);
    expect(FCI?.limit).toBeCloseTo(RHF?.limit ?? Number.NaN, 9);
    expect(FCI?.depth).toBeCloseTo((RHF?.limit ?? 0) - (FCI?.energy ?? 0), 9);
  });

  it('identity: no determinant of N mixes with its ⁴S in STO-3G, so that full CI of N2 tends to ROHF atoms', () => {
    const { RHF, CISD, FCI } = depthsOf(N2, 'STO-3G', LEVELS, true);
    expect(FCI?.limit).toBeCloseTo(RHF?.limit ?? Number.NaN, 8);
    expect(CISD?.limit).toBeCloseTo(RHF?.limit ?? Number.NaN, 8);
    const depths = [RHF, CISD, FCI].map((found) => found?.depth ?? Number.NaN);
    expect(depths).toEqual(depths.toSorted((a, b) => a - b));
  });

  it('published: full CI of H2 in STO-3G against two atoms of integrals printed', () => {
    const { FCI } = depthsOf([atom('H'), atom('H', 0, 0, 1.4)], 'STO-3G', ['FCI']);
    // T11 + V11 of the own nucleus is the atom; −1.1167 and −0.020562 the molecule
    expect(FCI?.depth).toMatchPublished({
      printed: (2 * (0.76 - 1.2266) + 1.1167 + 0.0206).toFixed(4),
      tolerance: 2.5e-4,
      because: 'a sum of five rounded numbers',
      source:
        'A. Szabo, N. S. Ostlund, Modern Quantum Chemistry (1989), secs. 3.5.2 and 4.1, value from memory',
    });
  });
});
