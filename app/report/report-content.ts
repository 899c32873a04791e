import type { StudyResults } from '#engine';
import { formula } from '../study/formula';
import { basesTable, limitTable } from './bases-table';
import { cautionSummary } from './caution-summary';
import { comparabilityNotes } from './comparability';
import { correlationTables } from './correlation-tables';
import { energiesTables } from './energies-table';
import { excitedLimitsTable } from './excited-limits-table';
import { excitedTable, franckCondonTables } from './excited-tables';
import { findingsTable } from './findings-table';
import { fitsTable } from './fits-table';
import { isotopologuesTable, rotationTables } from './further-levels-tables';
import { methodParagraphs } from './method-section';
import type { NamedResults } from './named-results';
import { Citations } from './references';
import type { ListItem, ReportBlock, ReportDocument } from './report-document';
import { coordinateText, sharedCoordinate } from './scanned-coordinate';
import { ended, enumerated } from './sentences';
import { constantsTable, LEVELS_IN_BODY, levelsTable } from './spectroscopy-tables';
import type { TextTable } from './text-table';

/** Said beside every well depth. */
export const SAFETY_NOTE =
  'Energies of a model in a finite basis, not measured data: for decisions about safety rely on measurements, the rules in force and qualified judgement.';

export interface ReportInput {
  readonly results: readonly StudyResults[];
  /** one a results file */
  readonly names: readonly string[];
  /** the study sentence of each file */
  readonly sentences: readonly string[];
  /** what stands beneath the figure after the sentences, or why there is none */
  readonly figure: { readonly key: readonly string[] } | { readonly reason: string };
}

/**
 * What a report says, before it is set in any format.
 *
 * @throws ReportError `report.coordinatesDiffer`
 */
export function reportDocument({ results, names, sentences, figure }: ReportInput): ReportDocument {
  // refuses what cannot stand in one table
  const shared = sharedCoordinate(results, names);
  const isComparison = results.length > 1;
  const files = results.map((file, index): NamedResults => {
    return { name: isComparison ? (names[index] ?? '') : '', results: file };
  });
  const citations = new Citations();
  const caption = captionOf(files, sentences);
  const levels = levelsTable(files);
  const hasManyLevels = (levels?.rows.length ?? 0) > LEVELS_IN_BODY;
  const body: readonly ReportBlock[] = [
    ...files.flatMap(introduction),
    ...comparabilityNotes(files).map((text) => paragraph(text)),
    ...('reason' in figure
      ? [paragraph(`No figure: ${figure.reason}`, 'note')]
      : [{ kind: 'figure', caption: [caption, ...figure.key].join(' ') } as const]),
    ...section('Findings', [
      ...tables(findingsTable(files, shared)),
      ...files.flatMap((file) => tables(constantsTable(file, citations))),
    ]).concat(paragraph(SAFETY_NOTE, 'note')),
    ...section('Vibrational levels', [
      ...tables(hasManyLevels ? levelsTable(files, LEVELS_IN_BODY) : levels),
      ...tables(...files.flatMap(rotationTables)),
      ...tables(isotopologuesTable(files)),
    ]),
    ...section(
      'Electron correlation',
      files.flatMap((file) => tables(...correlationTables(file, shared, citations))),
    ),
    ...section('Excited states', [
      ...tables(excitedTable(files, shared), excitedLimitsTable(files, shared)),
      ...files.flatMap((file) => tables(...franckCondonTables(file))),
    ]),
    ...section('Basis sets', tables(basesTable(files, shared), limitTable(files, shared))),
    ...section('Closed forms', tables(fitsTable(files))),
    ...section('Cautions', listOf(files.flatMap(cautionItems))),
    ...section('Method', methodBlocks(files, citations)),
  ];
  const references: ReportBlock = { kind: 'references', references: citations.list };
  return {
    title: shortTitle(files),
    heading: isComparison ? `Comparison of ${enumerated(names)}` : (sentences[0] ?? ''),
    blocks: [
      ...body,
      ...section('References', [references]),
      ...section('Appendix', [
        ...(hasManyLevels && levels ? tables({ ...levels, heading: 'All vibrational levels' }) : []),
        ...tables(...energiesTables(files, shared)),
      ]),
    ],
  };
}

/** Longer ones are cut by windows and search engines. */
const LONGEST_TITLE = 70;

function shortTitle(files: readonly NamedResults[]): string {
  const [first] = files;
  const titles =
    files.length === 1 && first
      ? [first.results.study.title ?? '', formula(first.results.study.molecule)]
      : [
          `Comparison of ${enumerated(files.map(({ name }) => name))}`,
          `Comparison of ${files.length} studies`,
        ];
  return titles.find((title) => title !== '' && title.length <= LONGEST_TITLE) ?? 'Report';
}

/** What a figure shows: the study sentences, named where there are several. */
export function captionOf(files: readonly NamedResults[], sentences: readonly string[]): string {
  return files
    .map(({ name }, index) => ended(name ? `${name}: ${sentences[index]}` : (sentences[index] ?? '')))
    .join(' ');
}

const paragraph = (text: string, tone?: 'title' | 'note'): ReportBlock => ({
  kind: 'paragraph',
  text,
  ...(tone && { tone }),
});

const tables = (...all: readonly (TextTable | undefined)[]): readonly ReportBlock[] =>
  all.flatMap((table) => (table ? [{ kind: 'table', table } as const] : []));

const listOf = (items: readonly ListItem[]): readonly ReportBlock[] =>
  items.length > 0 ? [{ kind: 'list', items }] : [];

/** Nothing at all where there is nothing to say. */
const section = (heading: string, blocks: readonly ReportBlock[]): readonly ReportBlock[] =>
  blocks.length > 0 ? [{ kind: 'section', heading }, ...blocks] : [];

function introduction({ name, results: { study } }: NamedResults): readonly ReportBlock[] {
  const { title, notes } = study;
  const heading = [name, title].filter(Boolean).join(': ');
  return [
    ...(heading ? [paragraph(heading, 'title')] : []),
    // paragraphs of the user's own
    ...(notes ?? '').split(/\n{2,}/).flatMap((text) => (text.trim() ? [paragraph(text.trim())] : [])),
  ];
}

function cautionItems({ name, results }: NamedResults): readonly ListItem[] {
  const { unit } = sharedCoordinate([results], ['']);
  return cautionSummary(results, (coordinate) => coordinateText(coordinate, unit)).map((item) => ({
    ...item,
    lead: [name, item.lead].filter(Boolean).join(', '),
  }));
}

/** Said once where all files were made in the same way. */
function methodBlocks(files: readonly NamedResults[], citations: Citations): readonly ReportBlock[] {
  const methods = files.map(({ name, results }) => ({
    name,
    paragraphs: methodParagraphs(results, citations),
  }));
  const [first] = methods;
  const isShared = methods.every(({ paragraphs }) => paragraphs.join() === first?.paragraphs.join());
  if (isShared) return (first?.paragraphs ?? []).map((text) => paragraph(text));
  return methods.flatMap(({ name, paragraphs }) => [
    paragraph(name, 'title'),
    ...paragraphs.map((text) => paragraph(text)),
  ]);
}
