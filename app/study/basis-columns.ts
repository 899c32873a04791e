import type { StudyResults } from '#engine';

/** One level along the scan in a further basis, or in the limit that the bases tend to. */
export interface BasisColumn {
  /** `FCI/cc-pVTZ`; `FCI/limit` */
  readonly label: string;
  /** hartree; null where it is not known */
  readonly energies: readonly (number | null)[];
  /** energy minus the Hartree–Fock energy in that basis */
  readonly correlation?: readonly (number | null)[];
  /** of the limit, hartree */
  readonly uncertainties?: readonly (number | null)[];
}

/** The energies of a study in its further bases, basis by basis, then in their limit; of CIS the lowest state. */
export function basisColumns({
  study,
  basis: own,
  furtherBases = [],
  basisSetLimit,
}: StudyResults): readonly BasisColumn[] {
  const taken = [own.name];
  const inBases = furtherBases.flatMap(({ basis, levels }) => {
    // sets of the user's own may share a name
    const before = taken.filter((name) => name === basis.name).length;
    taken.push(basis.name);
    const name = before === 0 ? basis.name : `${basis.name} (${before + 1})`;
    return study.levels.flatMap((level): BasisColumn[] => {
      const inBasis = levels[level];
      return inBasis ? [{ label: `${level}/${name}`, ...inBasis }] : [];
    });
  });
  if (basisSetLimit?.kind !== 'found') return inBases;
  const inLimit = study.levels.flatMap((level): BasisColumn[] => {
    const energies = basisSetLimit.levels[level]?.energies;
    if (!energies) return [];
    return [
      {
        label: `${level}/limit`,
        energies: energies.map((estimate) => estimate?.value ?? null),
        uncertainties: energies.map((estimate) => estimate?.uncertainty ?? null),
      },
    ];
  });
  return [...inBases, ...inLimit];
}
