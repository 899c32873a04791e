import { describe, expect, it } from 'vitest';
import { computePoint, type PreparedStudy, type StudyAtom } from '#engine';
import { placeBasis } from '../../../engine/basis/place-basis';
import { dissociationLimit } from '../../../engine/calculation/fragments';
import { groundEnergy } from '../../../engine/calculation/level-curve';
import { independentEnergies, type Occupations } from '../../support/independent-energies';
import { atom, prepare, study } from '../../support/studies';

/*
 * Well depths of the engine beside those of a self-consistent field and a CI that share nothing with it but the integrals
 * over basis functions. Of N2 in 6-31G full CI, 19 million determinants with frozen cores, is left out.
 */

const BASES = ['STO-3G', '6-31G'] as const;
const LEVELS = ['RHF', 'CISD', 'FCI'] as const;

interface Case {
  readonly name: string;
  readonly elements: readonly [string, string];
  /** bohr */
  readonly distance: number;
  readonly occupations: Occupations;
  readonly frozenCore: boolean;
}

const CASES: readonly Case[] = [
  {
    name: 'H2',
    elements: ['H', 'H'],
    distance: 1.389,
    occupations: { closed: [1, 0, 0], open: [0, 0, 0] },
    frozenCore: false,
  },
  {
    name: 'LiH',
    elements: ['Li', 'H'],
    distance: 3,
    occupations: { closed: [2, 0, 0], open: [0, 0, 0] },
    frozenCore: false,
  },
  {
    name: 'HF',
    elements: ['F', 'H'],
    distance: 1.807,
    occupations: { closed: [3, 1, 1], open: [0, 0, 0] },
    frozenCore: true,
  },
  {
    name: 'N2',
    elements: ['N', 'N'],
    distance: 2.143,
    occupations: { closed: [5, 1, 1], open: [0, 0, 0] },
    frozenCore: true,
  },
];

/** Of fluorine the hole may be in any p orbital; of nitrogen one electron is in each. */
const ATOMS: Readonly<Record<string, { readonly occupations: Occupations; readonly cores: number }>> = {
  H: { occupations: { closed: [0, 0, 0], open: [1, 0, 0] }, cores: 0 },
  Li: { occupations: { closed: [1, 0, 0], open: [1, 0, 0] }, cores: 1 },
  F: { occupations: { closed: [2, 1, 1], open: [1, 0, 0] }, cores: 1 },
  N: { occupations: { closed: [2, 0, 0], open: [1, 1, 1] }, cores: 1 },
};

function energiesOf(
  atoms: readonly StudyAtom[],
  basis: string,
  occupations: Occupations,
  frozen: number,
  withFull = true,
) {
  const open = occupations.open.reduce((sum, count) => sum + count, 0);
  const single = prepare({
    ...study(atoms, { basis, levels: ['UHF'] }),
    molecule: { unit: 'bohr', atoms, multiplicity: open + 1 },
  });
  const molecule = single.moleculeAt(null);
  const placed = placeBasis(single.basisSet, molecule);
  const { meanField, singlesDoubles, full } = independentEnergies(
    molecule,
    placed,
    occupations,
    frozen,
    withFull,
  );
  return { RHF: meanField, CISD: singlesDoubles, FCI: full };
}

function depthOf(prepared: PreparedStudy, level: string): number {
  const [distance] = prepared.coordinates;
  const energy = groundEnergy(computePoint(prepared, distance!).result.levels[level]);
  const limit = dissociationLimit(prepared, level, { x: distance!, energy: energy! });
  if (limit?.kind !== 'found') throw new Error(`no limit at ${level}`);
  return limit.energy - energy!;
}

describe.each(BASES)('well depths in %s', (basis) => {
  it.each(CASES)(
    'independent: $name by RHF, CISD and full CI',
    (molecule) => {
      const { elements, distance, frozenCore } = molecule;
      const atoms = [atom(elements[0]), atom(elements[1], 0, 0, distance)];
      const frozen = (cores: number) => (frozenCore ? cores : 0);
      const isTooLarge = molecule.name === 'N2' && basis === '6-31G';
      const cores = elements.reduce((sum, element) => sum + ATOMS[element]!.cores, 0);
      const whole = energiesOf(atoms, basis, molecule.occupations, frozen(cores), !isTooLarge);
      const apart = elements.map((element) => {
        const own = ATOMS[element]!;
        return energiesOf([atom(element)], basis, own.occupations, frozen(own.cores));
      });
      const levels = LEVELS.filter((level) => !(isTooLarge && level === 'FCI'));
      const scan = { coordinate: { bonds: [[0, 1] as const] }, values: [distance] };
      const prepared = prepare(study(atoms, { basis, levels, frozenCore, scan }));
      for (const level of levels) {
        const depth = apart[0]![level] + apart[1]![level] - whole[level];
        expect(depthOf(prepared, level), level).toBeCloseTo(depth, 7);
      }
    },
    120_000,
  );
});
