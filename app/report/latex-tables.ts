import { latexText } from './latex-text';
import { type ReportDocument, tablesOf } from './report-document';
import { ended } from './sentences';
import {
  headSpans,
  LONGEST_LINE,
  NO_VALUE,
  splitTable,
  type TableColumn,
  type TextTable,
  tableWidth,
} from './text-table';

/** Characters that a line of 160 mm holds in small type, and in that of the text; wider tables take the first. */
const LINE_LENGTH = 95;
const LINE_LENGTH_AT_FULL_SIZE = 75;
/** Longer tables are set with longtable, which breaks across pages. */
const LINES_ON_A_PAGE = 42;
/** Of a column whose words are broken into lines; about what `LONGEST_LINE` characters take. */
const WRAPPED_COLUMN = 'p{0.26\\linewidth}';

/**
 * All tables of a report for LaTeX (packages booktabs and, for what is longer than a page, longtable), each captioned
 * with its heading, the report's own and its notes.
 */
export function latexTables(document: ReportDocument): string {
  const tables = tablesOf(document).flatMap((table) => splitTable(table, LINE_LENGTH, 'onOneLine'));
  const subject = document.heading;
  const hasLong = tables.some((table) => isLong(table, subject));
  return [
    `% \\usepackage{booktabs${hasLong ? ',longtable' : ''}}`,
    ...tables.map((table) => setTable(table, subject)),
  ]
    .join('\n\n')
    .concat('\n');
}

/** Counts the lines that the caption and wrapped words take. */
function isLong(table: TextTable, subject: string): boolean {
  const lines = table.rows.reduce(
    (sum, row) => sum + Math.max(...row.map((cell) => linesOf(cell, LONGEST_LINE))),
    linesOf(captionOf(table, subject), LINE_LENGTH),
  );
  return lines > LINES_ON_A_PAGE;
}

const linesOf = (text: string, length: number): number => Math.max(1, Math.ceil(text.length / length));

const captionOf = ({ heading, notes }: TextTable, subject: string): string =>
  [heading, subject, ...notes].map(ended).join(' ');

function setTable(table: TextTable, subject: string): string {
  const { columns, rows } = table;
  const alignment = columns.map((column, index) =>
    alignmentOf(
      column,
      rows.map((row) => row[index] ?? ''),
    ),
  );
  const caption = latexText(captionOf(table, subject));
  const size = tableWidth(table, 'onOneLine') > LINE_LENGTH_AT_FULL_SIZE ? ['\\footnotesize'] : [];
  const head = [...spanningRows(columns), `${columns.map(({ label }) => latexText(label)).join(' & ')} \\\\`];
  // in a ragged cell the usual end of a row only breaks the line
  const endOfRow = alignment.at(-1) === WRAPPED_COLUMN ? '\\tabularnewline' : '\\\\';
  const body = rows.map((row) => {
    const cells = row.map((cell, index) =>
      alignment[index] === WRAPPED_COLUMN ? raggedCell(cell) : latexCell(cell),
    );
    return `${cells.join(' & ')} ${endOfRow}`;
  });
  const lines = isLong(table, subject)
    ? [
        '{',
        ...size,
        `\\begin{longtable}{${alignment.join('')}}`,
        `\\caption{${caption}}\\\\`,
        '\\toprule',
        ...head,
        '\\midrule',
        '\\endhead',
        '\\bottomrule',
        '\\endfoot',
        ...body,
        '\\end{longtable}',
        '}',
      ]
    : [
        '\\begin{table}',
        '\\centering',
        `\\caption{${caption}}`,
        // most classes leave no room below a caption
        '\\medskip',
        ...size,
        `\\begin{tabular}{${alignment.join('')}}`,
        '\\toprule',
        ...head,
        '\\midrule',
        ...body,
        '\\bottomrule',
        '\\end{tabular}',
        '\\end{table}',
      ];
  return lines.join('\n');
}

function alignmentOf({ content }: TableColumn, cells: readonly string[]): string {
  if (content !== 'words') return 'r';
  return cells.some((cell) => cell.length > LONGEST_LINE) ? WRAPPED_COLUMN : 'l';
}

/** For every row of heads that span columns one line, and one of rules beneath them. */
function spanningRows(columns: readonly TableColumn[]): string[] {
  return headSpans(columns).flatMap((spans) => {
    const cells = spans.map(({ text, width }) => `\\multicolumn{${width}}{c}{${latexText(text)}}`);
    let column = 1;
    const rules = spans.flatMap(({ text, width }) => {
      const first = column;
      column += width;
      return text ? [`\\cmidrule(lr){${first}-${column - 1}}`] : [];
    });
    return [`${cells.join(' & ')} \\\\`, rules.join(' ')];
  });
}

const raggedCell = (cell: string): string => `\\raggedright ${latexCell(cell)}`;

/** Numbers in mathematics, for their minus signs. */
function latexCell(cell: string): string {
  if (cell === '') return latexText(NO_VALUE);
  const number = cell.replace(/^−/, '-');
  return /^[-+]?[\d.]+$/.test(number) ? `$${number}$` : latexText(cell);
}
