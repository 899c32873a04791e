import { beforeAll, describe, expect, it } from 'vitest';
import { basisSetLimit, computePoint, type Estimate, type StudyAtom, type StudyInBasis } from '#engine';
import { ATOMIC_LIMITS, HYDROGEN_MOLECULE_LIMIT } from '../../reference-data/hartree-fock-limits';
import { HYDROGEN_CURVE } from '../../reference-data/hydrogen-curve';
import { HELIUM_NEAR_EXACT } from '../../reference-data/near-exact';
import type { PublishedRow } from '../../reference-data/published-row';
import { atom, correlated, hartreeFock, prepare, study } from '../../support/studies';

const FAMILY = ['cc-pVDZ', 'cc-pVTZ', 'cc-pVQZ'] as const;
const LEVELS = ['RHF', 'FCI'] as const;
const TIMEOUT = 120_000;

/** A single point in every set of the family. */
function inFamily(atoms: readonly StudyAtom[]): readonly StudyInBasis[] {
  return FAMILY.map((basis) => {
    const prepared = prepare(study(atoms, { basis, levels: LEVELS }));
    const { result } = computePoint(prepared, null, { describesStates: false });
    const { energy, correlation } = correlated(result);
    return {
      basis: { name: basis, harmonics: 'spherical', functions: 0, shells: {}, citations: [], notes: [] },
      levels: {
        RHF: { energies: [hartreeFock(result).energy] },
        FCI: { energies: [energy], correlation: [correlation] },
      },
      findings: {},
      cautions: [],
    };
  });
}

function limitsOf(studies: readonly StudyInBasis[]): Readonly<Record<string, Estimate>> {
  const limit = basisSetLimit(studies);
  if (limit.kind !== 'found') throw new Error(limit.reason);
  return Object.fromEntries(LEVELS.map((level) => [level, limit.levels[level]!.energies[0]!] as const));
}

interface Case {
  readonly name: string;
  readonly atoms: readonly StudyAtom[];
  readonly limits: Readonly<Record<(typeof LEVELS)[number], PublishedRow>>;
}

const DISTANCE = 1.4;
const HYDROGEN_NEAR_EXACT: PublishedRow = {
  system: 'H2',
  quantity: 'total energy',
  printed: HYDROGEN_CURVE.find(([distance]) => distance === DISTANCE)![1],
  source: 'J. S. Sims, S. A. Hagstrom, J. Chem. Phys. 124, 094101 (2006), Table VI, value from memory',
};

const CASES: readonly Case[] = [
  { name: 'He', atoms: [atom('He')], limits: { RHF: ATOMIC_LIMITS.He, FCI: HELIUM_NEAR_EXACT } },
  {
    name: `H2 at ${DISTANCE} bohr`,
    atoms: [atom('H'), atom('H', 0, 0, DISTANCE)],
    limits: { RHF: HYDROGEN_MOLECULE_LIMIT, FCI: HYDROGEN_NEAR_EXACT },
  },
];

describe.each(CASES)('limit of the correlation-consistent family for $name', ({ atoms, limits }) => {
  let studies: readonly StudyInBasis[];
  beforeAll(() => {
    studies = inFamily(atoms);
  }, TIMEOUT);

  it.each(LEVELS)('published: %s from two sets and from three, within the uncertainty given', (level) => {
    for (const members of [studies, studies.slice(0, 2), studies.slice(1)]) {
      const { value, uncertainty } = limitsOf(members)[level]!;
      expect(value).toMatchPublished({
        ...limits[level],
        tolerance: uncertainty,
        because: 'the uncertainty that the extrapolation states',
      });
    }
  });

  it.each(LEVELS)(
    'published: %s in the limit is nearer to the published value than in the largest set',
    (level) => {
      const exact = Number(limits[level].printed);
      const largest = studies.at(-1)!.levels[level]!.energies[0]!;
      expect(Math.abs(limitsOf(studies)[level]!.value - exact)).toBeLessThan(largest - exact);
    },
  );
});
