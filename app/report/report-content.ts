import type { LevelFindings, StudyResults } from '#engine';
import { cautionSummary } from './caution-summary';
import { type FindingsRow, findingsRows } from './findings-table';
import { type ResultTable, resultTable } from './result-table';
import { coordinateText, sharedCoordinate } from './scanned-coordinate';
import { spectroscopyTables } from './spectroscopy-tables';
import type { TextTable } from './text-table';

/** What a report says, before it is set as Markdown or LaTeX. */
export interface ReportContent {
  readonly files: readonly ReportedFile[];
  readonly table: ResultTable;
  readonly findings: readonly FindingsRow[];
  /** constants and levels of every file */
  readonly spectroscopy: readonly TextTable[];
  /** why there is no figure */
  readonly withoutFigure?: string;
}

export interface ReportedFile {
  /** empty for a single one */
  readonly name: string;
  readonly sentence: string;
  readonly title: string;
  readonly notes: string;
  readonly cautions: readonly string[];
  /** basis set with its papers, thresholds, program */
  readonly method: readonly string[];
}

/** Said under every table of energies. */
export const DIGITS_NOTE = 'All digits are in the CSV file.';

/** Said beside every well depth. */
export const SAFETY_NOTE =
  'Energies of a model in a finite basis, not measured data: for decisions about safety rely on measurements, the rules in force and qualified judgement.';

/**
 * @param sentences - the study sentence of each file
 * @throws ReportError `report.coordinatesDiffer`
 */
export function reportContent(
  results: readonly StudyResults[],
  names: readonly string[],
  sentences: readonly string[],
  withoutFigure?: string,
): ReportContent {
  // refuses what cannot stand in one table
  sharedCoordinate(results, names);
  const nameOf = (index: number) => (results.length > 1 ? (names[index] ?? '') : '');
  return {
    files: results.map((file, index) => reportedFile(file, nameOf(index), sentences[index] ?? '')),
    table: resultTable(results, names),
    findings: results.flatMap((file, index) => findingsRows(file, nameOf(index), unitOf(file))),
    spectroscopy: results.flatMap((file, index) => spectroscopyTables(file, nameOf(index))),
    ...(withoutFigure === undefined ? {} : { withoutFigure }),
  };
}

/** The study sentence, or what is compared. */
export function reportHeading({ files }: ReportContent): string {
  const names = files.map(({ name }) => name);
  if (files.length === 1) return files[0]?.sentence ?? '';
  return `Comparison of ${names.slice(0, -1).join(', ')} and ${names.at(-1)}`;
}

function reportedFile(results: StudyResults, name: string, sentence: string): ReportedFile {
  const { study, basis, program } = results;
  const unit = unitOf(results);
  return {
    name,
    sentence,
    title: study.title ?? '',
    notes: study.notes ?? '',
    cautions: cautionSummary(results, (coordinate) => coordinateText(coordinate, unit)),
    method: [
      `Basis ${basis.name}, ${basis.functions} functions${basis.citations.length > 0 ? `: ${basis.citations.join('; ')}` : ''}.`,
      ...basis.notes,
      `Energies converged to ${study.convergence.energy} hartree; ${correlatedText(study)}.`,
      ...findingsMethod(results),
      `${program.name} ${program.version}.`,
    ],
  };
}

function correlatedText({ active, frozenCore, orbitals }: StudyResults['study']): string {
  const onOrbitals = orbitals === 'unrestricted' ? '; CI on UHF orbitals' : '';
  if (active) return `CI of ${active.electrons} electrons in ${active.orbitals} orbitals${onOrbitals}`;
  return `${frozenCore ? 'core electrons not correlated' : 'all electrons correlated'}${onOrbitals}`;
}

/** How what is in the tables of findings was found, as far as there is any. */
function findingsMethod({ findings }: StudyResults): readonly string[] {
  const all = Object.values(findings);
  const isAny = (test: (one: LevelFindings) => unknown) => all.some(test);
  return [
    ...(isAny(({ constants }) => constants)
      ? ['Minima from polynomials through further computed, closely spaced points around them.']
      : []),
    ...(isAny(({ constants }) => constants?.diatomic)
      ? [
          'Constants from derivatives at the minimum (J. L. Dunham, Phys. Rev. 41, 721 (1932)), with masses of neutral atoms.',
        ]
      : []),
    ...(isAny(({ wellDepth }) => wellDepth?.against === 'fragments')
      ? [
          'Well depths against separate fragments at the same level, of all ways to share charge and spin the lowest; open shells by ROHF where the molecule has RHF; no counterpoise correction.',
        ]
      : []),
    ...(isAny(({ vibration }) => vibration?.kind === 'found')
      ? [
          'Vibrational levels from the radial Schrödinger equation on a rational interpolant of the computed points, continued beyond them to the limit.',
        ]
      : []),
  ];
}

/** A file's own unit: findings are not converted. */
const unitOf = (results: StudyResults): string => sharedCoordinate([results], ['']).unit;
