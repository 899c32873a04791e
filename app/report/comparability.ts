import type { StudyResults } from '#engine';
import { formula } from '../study/formula';
import type { NamedResults } from './named-results';
import { enumerated } from './sentences';

/** Whether total energies of these results belong on one scale: the same nuclei and the same number of electrons. */
export const shareEnergyScale = (files: readonly NamedResults[]): boolean =>
  new Set(files.map(({ results }) => composition(results))).size <= 1;

/** What must be known before the numbers of several files are compared, as sentences. */
export function comparabilityNotes(files: readonly NamedResults[]): readonly string[] {
  const [first, ...others] = files;
  if (!first || others.length === 0) return [];
  const differ = (of: (results: StudyResults) => string) =>
    new Set(files.map(({ results }) => of(results))).size > 1;
  const listed = (of: (results: StudyResults) => string) =>
    files.map(({ name, results }) => `${name}: ${of(results)}`).join('; ');
  const missing = [...new Set(files.flatMap(({ results }) => results.study.levels))].flatMap((level) => {
    const without = files.filter(({ results }) => !results.study.levels.includes(level));
    return without.length > 0 ? [`${level} not in ${enumerated(without.map(({ name }) => name))}`] : [];
  });
  return [
    ...(shareEnergyScale(files)
      ? []
      : [
          `These are different molecules (${listed(moleculeOf)}): their total energies are not comparable. The figure shows every curve above its own minimum; distances, depths and constants can be compared.`,
        ]),
    ...(shareEnergyScale(files) && differ(({ study }) => String(study.molecule.multiplicity))
      ? [
          `Multiplicities differ (${listed(({ study }) => String(study.molecule.multiplicity))}): these are different states.`,
        ]
      : []),
    ...(differ(basisOf)
      ? [
          `Basis sets differ (${listed(basisOf)}): differences between the files contain that of the bases.${shareEnergyScale(files) ? ' At one geometry and level the lower Hartree–Fock or full CI energy is the better one.' : ''}`,
        ]
      : []),
    ...(differ(coreOf)
      ? [`Different electrons are correlated (${listed(coreOf)}): correlation energies are not comparable.`]
      : []),
    ...(differ(orbitalsOf)
      ? [
          `CI stands on different orbitals (${listed(orbitalsOf)}); truncated CI is not comparable to that extent.`,
        ]
      : []),
    ...(missing.length > 0 ? [`Not every level is in every file: ${missing.join('; ')}.`] : []),
  ];
}

const composition = ({ study }: StudyResults): string =>
  [
    ...study.molecule.atoms
      .filter(({ ghost }) => !ghost)
      .map(({ element }) => element)
      .sort(),
    study.molecule.charge,
  ].join(' ');

const moleculeOf = ({ study }: StudyResults): string => formula(study.molecule);
const basisOf = ({ basis }: StudyResults): string => `${basis.name}, ${basis.functions} functions`;
const orbitalsOf = ({ study }: StudyResults): string =>
  study.orbitals === 'unrestricted' ? 'UHF orbitals' : 'RHF or ROHF orbitals';

function coreOf({ study: { active, frozenCore } }: StudyResults): string {
  if (active) return `${active.electrons} in ${active.orbitals} orbitals`;
  return frozenCore ? 'core frozen' : 'all';
}
