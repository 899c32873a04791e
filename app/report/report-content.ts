import type { StudyResults } from '#engine';
import { cautionSummary } from './caution-summary';
import { type FindingsRow, findingsRows } from './findings-table';
import { type ResultTable, resultTable } from './result-table';
import { coordinateText, sharedCoordinate } from './scanned-coordinate';

/** What a report says, before it is set as Markdown or LaTeX. */
export interface ReportContent {
  readonly files: readonly ReportedFile[];
  readonly table: ResultTable;
  readonly findings: readonly FindingsRow[];
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
      `${program.name} ${program.version}.`,
    ],
  };
}

function correlatedText({ active, frozenCore }: StudyResults['study']): string {
  if (active) return `CI of ${active.electrons} electrons in ${active.orbitals} orbitals`;
  return frozenCore ? 'core electrons not correlated' : 'all electrons correlated';
}

/** A file's own unit: findings are not converted. */
const unitOf = (results: StudyResults): string => sharedCoordinate([results], ['']).unit;
