import { FINDINGS_HEADINGS } from './findings-table';
import {
  DIGITS_NOTE,
  type ReportContent,
  type ReportedFile,
  reportHeading,
  SAFETY_NOTE,
} from './report-content';
import { NOT_COMPUTED, type ResultTable } from './result-table';
import { withMinus } from './text-escapes';
import type { TextTable } from './text-table';

/** The report as Markdown: study sentence as heading, energies, notes, findings, cautions, method. */
export function markdownReport(content: ReportContent): string {
  const { files, table, findings, spectroscopy, withoutFigure } = content;
  const sections = [
    `# ${escapeMarkdown(reportHeading(content))}`,
    ...files.flatMap(introduction),
    ...(withoutFigure ? [`No figure: ${escapeMarkdown(withoutFigure)}`] : []),
    '## Energies',
    energyTable(table),
    ...[...table.notes, DIGITS_NOTE].map(escapeMarkdown),
    ...(findings.length > 0 ? ['## Findings', findingsTable(content), escapeMarkdown(SAFETY_NOTE)] : []),
    ...spectroscopy.flatMap(textTable),
    ...bulletSection('## Cautions', files, ({ cautions }) => cautions),
    ...bulletSection('## Method', files, ({ method }) => method),
  ];
  return `${sections.join('\n\n')}\n`;
}

function introduction({ name, sentence, title, notes }: ReportedFile): string[] {
  return [
    ...(name ? [`**${escapeMarkdown(name)}**: ${escapeMarkdown(sentence)}`] : []),
    ...(title ? [`*${escapeMarkdown(title)}*`] : []),
    ...(notes ? [escapeMarkdown(notes)] : []),
  ];
}

function energyTable({ coordinateHeading, blocks, rows }: ResultTable): string {
  const headings = blocks.flatMap(({ file, quantity, columns }) =>
    columns.map((column) => {
      const [, what = quantity, unit = ''] = /^(.*) (\(.*\))$/.exec(quantity) ?? [];
      return [file, column, what.toLowerCase(), unit].filter(Boolean).join(' ');
    }),
  );
  const body = rows.map(({ coordinate, cells }) => [
    withMinus(coordinate),
    ...cells.map((cell) => (cell === NOT_COMPUTED ? '–' : withMinus(cell))),
  ]);
  return tableText([coordinateHeading, ...headings], body, 'right');
}

function findingsTable({ files, findings }: ReportContent): string {
  const several = files.length > 1;
  const body = findings.map(({ file, level, minimum, energyAtMinimum, depth, onset }) => [
    ...(several ? [file] : []),
    level,
    minimum,
    withMinus(energyAtMinimum),
    withMinus(depth),
    onset,
  ]);
  return tableText([...(several ? ['File'] : []), ...FINDINGS_HEADINGS], body, 'left');
}

function textTable({ heading, columns, rows, notes }: TextTable): string[] {
  return [`## ${escapeMarkdown(heading)}`, tableText(columns, rows, 'right'), ...notes.map(escapeMarkdown)];
}

function tableText(
  headings: readonly string[],
  body: readonly (readonly string[])[],
  alignment: 'left' | 'right',
): string {
  const row = (cells: readonly string[]) => `| ${cells.map(escapeMarkdown).join(' | ')} |`;
  const rule = headings.map(() => (alignment === 'right' ? '---:' : ':---'));
  return [row(headings), `| ${rule.join(' | ')} |`, ...body.map(row)].join('\n');
}

function bulletSection(
  heading: string,
  files: readonly ReportedFile[],
  linesOf: (file: ReportedFile) => readonly string[],
): string[] {
  const lines = files.flatMap((file) =>
    linesOf(file).map(
      (line) => `- ${file.name ? `**${escapeMarkdown(file.name)}**: ` : ''}${escapeMarkdown(line)}`,
    ),
  );
  return lines.length > 0 ? [heading, lines.join('\n')] : [];
}

/** Text from outside cannot become markup, nor break out of its line or cell. */
const escapeMarkdown = (text: string): string =>
  text.replace(/\s+/g, ' ').replace(/[\\`*_[\]<>|#]/g, (character) => `\\${character}`);
