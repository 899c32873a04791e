import { describe, expect, it } from 'vitest';
import {
  type BasisRequest,
  type CorrelatedResult,
  computePoint,
  type HartreeFockResult,
  type PointResult,
  prepareStudy,
  type SinglesResult,
  type StudyMolecule,
} from '#engine';
import { HYDROGEN_SINGLES } from '../../reference-data/closed-forms';
import {
  WATER_CISD_SHARE,
  WATER_DOUBLE_ZETA,
  WATER_GEOMETRY,
} from '../../reference-data/saxe-schaefer-handy';
import {
  HELIUM_HYDRIDE,
  HYDROGEN_CORRELATION,
  HYDROGEN_MOLECULE,
  KOOPMANS_IONISATION,
  SPLIT_431_ENERGIES,
  SPLIT_631_TWO_STARS_ENERGIES,
  STO_3G_ENERGIES,
} from '../../reference-data/szabo-ostlund';
import { STANDARD_GEOMETRIES } from '../../support/standard-geometries';
import { pairedOrbitalEnergies } from '../../support/studies';

function computed(molecule: StudyMolecule, basis: BasisRequest, levels: readonly string[]): PointResult {
  const preparation = prepareStudy({ format: 'farwell/study', version: 1, molecule, basis, levels });
  if (!preparation.ok) throw preparation.errors[0];
  const { result } = computePoint(preparation.prepared, null);
  for (const level of levels) expect(result.levels[level]?.converged, level).toBe(true);
  return result;
}

function levelOf<K extends 'hartreeFock' | 'correlated' | 'singles'>(
  point: PointResult,
  level: string,
  kind: K,
): Extract<HartreeFockResult | CorrelatedResult | SinglesResult, { readonly kind: K }> {
  const result = point.levels[level];
  if (result?.kind !== kind) throw new Error(`${level} is ${result?.kind}`);
  return result as Extract<HartreeFockResult | CorrelatedResult | SinglesResult, { readonly kind: K }>;
}

const standard = (system: string): StudyMolecule => {
  const geometry = STANDARD_GEOMETRIES[system];
  if (!geometry) throw new Error(`no standard geometry of ${system}`);
  return geometry;
};

const restrictedEnergy = (molecule: StudyMolecule, basis: BasisRequest): number =>
  levelOf(computed(molecule, basis, ['RHF']), 'RHF', 'hartreeFock').energy;

describe('RHF at the standard geometries', () => {
  it.each(STO_3G_ENERGIES)('published: $system, STO-3G, total energy', (row) => {
    expect(restrictedEnergy(standard(row.system), 'STO-3G')).toMatchPublished(row);
  });

  it.each(SPLIT_431_ENERGIES)('published: $system, 4-31G, total energy', (row) => {
    expect(restrictedEnergy(standard(row.system), '4-31G')).toMatchPublished(row);
  });

  it.each(SPLIT_631_TWO_STARS_ENERGIES)('published: $system, 6-31G**, total energy', (row) => {
    expect(restrictedEnergy(standard(row.system), '6-31G**')).toMatchPublished(row);
  });
});

describe('Koopmans’ theorem at the standard geometries', () => {
  /** place of the orbital in order of energy; N2 in a minimal basis has 3σg above the 1πu pair */
  const ORBITALS: Readonly<Record<string, number>> = { 'H2O 1b1': 4, 'N2 1πu': 5 };

  it.each(KOOPMANS_IONISATION)('published: $system, $basis, $quantity', (row) => {
    const orbitalEnergies = pairedOrbitalEnergies(
      levelOf(computed(standard(row.system), row.basis, ['RHF']), 'RHF', 'hartreeFock'),
    );
    const orbital = ORBITALS[`${row.system} ${row.quantity.split(' ').at(-1)}`]!;
    expect(-orbitalEnergies[orbital]!).toMatchPublished(row);
  });
});

describe('H2 at 1.4 bohr in STO-3G', () => {
  const point = computed(standard('H2'), 'STO-3G', ['RHF', 'CIS', 'CISD', 'FCI']);
  const restricted = levelOf(point, 'RHF', 'hartreeFock');
  const full = levelOf(point, 'FCI', 'correlated');

  it('published: total, electronic and orbital energies', () => {
    expect(restricted.energy).toMatchPublished(HYDROGEN_MOLECULE.totalEnergy);
    expect(restricted.energy - point.nuclearRepulsion).toMatchPublished(HYDROGEN_MOLECULE.electronicEnergy);
    const orbitalEnergies = pairedOrbitalEnergies(restricted);
    expect(orbitalEnergies[0]).toMatchPublished(HYDROGEN_MOLECULE.orbitalEnergy1);
    expect(orbitalEnergies[1]).toMatchPublished(HYDROGEN_MOLECULE.orbitalEnergy2);
  });

  it('published: full CI energy, correlation energy and weight of the double excitation', () => {
    expect(full.energy).toMatchPublished(HYDROGEN_MOLECULE.fullEnergy);
    expect(full.correlation).toMatchPublished(HYDROGEN_MOLECULE.correlationEnergy);
    const ratio = -Math.sqrt((1 - full.referenceWeight) / full.referenceWeight);
    expect(ratio).toMatchPublished(HYDROGEN_MOLECULE.doubleExcitationRatio);
  });

  it('identity: CISD of two electrons is full CI', () => {
    const { energy } = levelOf(point, 'CISD', 'correlated');
    expect(Math.abs(energy - full.energy)).toBeLessThan(1e-10);
  });

  it.each(['singlet', 'triplet'] as const)(
    'independent: CIS excitation energy of the %s in closed form',
    (spin) => {
      const state = levelOf(point, 'CIS', 'singles').states.find((one) => one.spin === spin);
      expect(state?.excitation).toMatchPublished(HYDROGEN_SINGLES[spin]);
    },
  );
});

describe('H2 at 1.4 bohr in larger sets', () => {
  it.each(HYDROGEN_CORRELATION)('published: $basis, full CI correlation energy', (row) => {
    const { correlation } = levelOf(computed(standard('H2'), row.basis, ['FCI']), 'FCI', 'correlated');
    expect(correlation).toMatchPublished(row);
  });
});

describe('HeH+ at 1.4632 bohr in STO-3G with ζ = 2.0925 and 1.24', () => {
  const point = computed(
    {
      unit: 'bohr',
      atoms: [
        { element: 'He', at: [0, 0, 0] },
        { element: 'H', at: [0, 0, 1.4632] },
      ],
      charge: 1,
    },
    { name: 'STO-3G', scaleFactors: { He: { '1s': 2.0925 }, H: { '1s': 1.24 } } },
    ['RHF'],
  );
  const restricted = levelOf(point, 'RHF', 'hartreeFock');
  const orbitalEnergies = pairedOrbitalEnergies(restricted);
  const { energy } = restricted;

  it('published: total and electronic energy', () => {
    expect(energy).toMatchPublished(HELIUM_HYDRIDE.totalEnergy);
    expect(energy - point.nuclearRepulsion).toMatchPublished(HELIUM_HYDRIDE.electronicEnergy);
  });

  it('published: orbital energies', () => {
    expect(orbitalEnergies[0]).toMatchPublished(HELIUM_HYDRIDE.orbitalEnergy1);
    expect(orbitalEnergies[1]).toMatchPublished(HELIUM_HYDRIDE.orbitalEnergy2);
  });
});

describe('H2O in the double-zeta basis', () => {
  const point = computed(WATER_GEOMETRY, 'DZ', ['RHF', 'CISD']);

  it('published: RHF total energy', () => {
    expect(levelOf(point, 'RHF', 'hartreeFock').energy).toMatchPublished(WATER_DOUBLE_ZETA.RHF);
  });

  it('published: CISD total energy, all electrons correlated', () => {
    expect(levelOf(point, 'CISD', 'correlated').energy).toMatchPublished(WATER_DOUBLE_ZETA.CISD);
  });

  it('published: share of the full-CI correlation energy that CISD recovers', () => {
    const { energy, correlation } = levelOf(point, 'CISD', 'correlated');
    const fullCorrelation = Number(WATER_DOUBLE_ZETA.FCI.printed) - (energy - correlation);
    expect((100 * correlation) / fullCorrelation).toMatchPublished(WATER_CISD_SHARE);
  });
});
