import { latexText } from './latex-text';
import type { ReportContent } from './report-content';
import { NOT_COMPUTED, NOT_CONVERGED, type ResultTable, type TableBlock } from './result-table';
import type { TextTable } from './text-table';

/** Wider tables are set in small type. */
const COLUMNS_AT_FULL_SIZE = 6;
/** Longer tables are set with longtable, which breaks across pages. */
const ROWS_ON_A_PAGE = 42;

/**
 * The energies as a LaTeX table (packages booktabs and, beyond a page, longtable), captioned with the study sentence;
 * below it the constants and levels.
 */
export function latexTable({ files, table, spectroscopy }: ReportContent): string {
  const isLong = table.rows.length > ROWS_ON_A_PAGE;
  const columns = `r${table.blocks.flatMap((block) => block.columns.map(() => 'r')).join('')}`;
  const caption = [
    ...files.map(({ name, sentence }) => (name ? `${name}: ${sentence}` : sentence)),
    ...table.notes,
  ].join(' ');
  const size = columns.length > COLUMNS_AT_FULL_SIZE ? ['\\footnotesize'] : [];
  const head = headRows(table);
  const body = table.rows.map(
    ({ coordinate, cells }) => `${[coordinate, ...cells].map(latexCell).join(' & ')} \\\\`,
  );
  const lines = isLong
    ? [
        '% \\usepackage{booktabs,longtable}',
        '{',
        ...size,
        `\\begin{longtable}{${columns}}`,
        `\\caption{${latexText(caption)}}\\\\`,
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
        '% \\usepackage{booktabs}',
        '\\begin{table}',
        '\\centering',
        `\\caption{${latexText(caption)}}`,
        ...size,
        `\\begin{tabular}{${columns}}`,
        '\\toprule',
        ...head,
        '\\midrule',
        ...body,
        '\\bottomrule',
        '\\end{tabular}',
        '\\end{table}',
      ];
  return `${[...lines, ...spectroscopy.flatMap(textTable)].join('\n')}\n`;
}

function textTable({ heading, columns, rows, notes }: TextTable): string[] {
  const line = (cells: readonly string[]) => `${cells.map(latexText).join(' & ')} \\\\`;
  return [
    '',
    '\\begin{table}',
    '\\centering',
    `\\caption{${latexText([`${heading}.`, ...notes.map(ended)].join(' '))}}`,
    '\\footnotesize',
    `\\begin{tabular}{l${'r'.repeat(columns.length - 1)}}`,
    '\\toprule',
    line(columns),
    '\\midrule',
    ...rows.map(line),
    '\\bottomrule',
    '\\end{tabular}',
    '\\end{table}',
  ];
}

const ended = (sentence: string) => (/[.!?]$/.test(sentence) ? sentence : `${sentence}.`);

/** A line for the quantities that span their columns, one for the columns; of several files, one more above. */
function headRows({ coordinateHeading, blocks }: ResultTable): string[] {
  const spanning = (spans: readonly Span[]) =>
    ` & ${spans.map(({ text, width }) => `\\multicolumn{${width}}{c}{${latexText(text)}}`).join(' & ')} \\\\`;
  const rulesUnder = (spans: readonly Span[]) => {
    let column = 2;
    return spans
      .map(({ width }) => {
        const rule = `\\cmidrule(lr){${column}-${column + width - 1}}`;
        column += width;
        return rule;
      })
      .join(' ');
  };
  const files = fileSpans(blocks);
  const quantities = blocks.map(({ quantity, columns }) => ({ text: quantity, width: columns.length }));
  const labels = blocks.flatMap((block) => block.columns.map(latexText));
  return [
    ...(blocks.some(({ file }) => file) ? [spanning(files), rulesUnder(files)] : []),
    spanning(quantities),
    rulesUnder(quantities),
    `${[latexText(coordinateHeading), ...labels].join(' & ')} \\\\`,
  ];
}

interface Span {
  readonly text: string;
  readonly width: number;
}

/** Neighbouring blocks of one file become one span. */
function fileSpans(blocks: readonly TableBlock[]): readonly Span[] {
  const spans: { text: string; width: number }[] = [];
  for (const block of blocks) {
    const last = spans.at(-1);
    if (last?.text === block.file) last.width += block.columns.length;
    else spans.push({ text: block.file, width: block.columns.length });
  }
  return spans;
}

function latexCell(cell: string): string {
  if (cell === NOT_COMPUTED) return '--';
  return cell === NOT_CONVERGED || Number.isNaN(Number(cell)) ? latexText(cell) : `$${cell}$`;
}
