import { latexText } from './latex-text';
import type { ReportContent } from './report-content';
import { NOT_COMPUTED, NOT_CONVERGED, type ResultTable, type TableBlock } from './result-table';

/** Longer tables are set with longtable, which breaks across pages. */
const ROWS_ON_A_PAGE = 42;

/** The energies as a LaTeX table (packages booktabs and, beyond a page, longtable), captioned with the study sentence. */
export function latexTable({ files, table }: ReportContent): string {
  const isLong = table.rows.length > ROWS_ON_A_PAGE;
  const columns = `r${table.blocks.flatMap((block) => block.columns.map(() => 'r')).join('')}`;
  const caption = [
    ...files.map(({ name, sentence }) => (name ? `${name}: ${sentence}` : sentence)),
    ...table.notes,
  ].join(' ');
  const head = headRows(table);
  const body = table.rows.map(
    ({ coordinate, cells }) => `${[coordinate, ...cells].map(latexCell).join(' & ')} \\\\`,
  );
  const lines = isLong
    ? [
        '% \\usepackage{booktabs,longtable}',
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
      ]
    : [
        '% \\usepackage{booktabs}',
        '\\begin{table}',
        '\\centering',
        `\\caption{${latexText(caption)}}`,
        `\\begin{tabular}{${columns}}`,
        '\\toprule',
        ...head,
        '\\midrule',
        ...body,
        '\\bottomrule',
        '\\end{tabular}',
        '\\end{table}',
      ];
  return `${lines.join('\n')}\n`;
}

/** One line for quantities that span their columns, one for the columns; of several files, one more above. */
function headRows({ coordinateHeading, blocks }: ResultTable): string[] {
  const rules: string[] = [];
  let column = 2;
  for (const block of blocks) {
    rules.push(`\\cmidrule(lr){${column}-${column + block.columns.length - 1}}`);
    column += block.columns.length;
  }
  const spanning = (textOf: (block: TableBlock) => string) =>
    ` & ${blocks.map((block) => `\\multicolumn{${block.columns.length}}{c}{${latexText(textOf(block))}}`).join(' & ')} \\\\`;
  const labels = blocks.flatMap((block) => block.columns.map(latexText));
  return [
    ...(blocks.some(({ file }) => file) ? [spanning(({ file }) => file)] : []),
    spanning(({ quantity }) => quantity),
    rules.join(' '),
    `${[latexText(coordinateHeading), ...labels].join(' & ')} \\\\`,
  ];
}

function latexCell(cell: string): string {
  if (cell === NOT_COMPUTED) return '--';
  return cell === NOT_CONVERGED || Number.isNaN(Number(cell)) ? latexText(cell) : `$${cell}$`;
}
