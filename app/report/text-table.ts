/** A table of words and numbers to be set in any format. */
export interface TextTable {
  /** part of the names of its files */
  readonly id: string;
  readonly heading: string;
  readonly columns: readonly TableColumn[];
  /** minus signs are true ones; an empty cell means that there is no value */
  readonly rows: readonly (readonly string[])[];
  /** sentences below it */
  readonly notes: readonly string[];
}

export interface TableColumn {
  /** what neighbouring columns share, from the outside in; it is set above them once */
  readonly groups?: readonly string[];
  readonly label: string;
  /** default numbers: at the right */
  readonly content?: 'words' | 'numbers';
}

/** What is set for a cell without a value. */
export const NO_VALUE = '–';

/** A head that spans neighbouring columns; empty text where a column has none. */
export interface HeadSpan {
  readonly text: string;
  readonly width: number;
}

/** The rows of heads above the labels, from the outside in; each covers all columns. */
export function headSpans(columns: readonly TableColumn[]): readonly (readonly HeadSpan[])[] {
  const depth = Math.max(0, ...columns.map(({ groups = [] }) => groups.length));
  return Array.from({ length: depth }, (_, row) => {
    const spans: { text: string; width: number; path: string }[] = [];
    for (const { groups = [] } of columns) {
      // the same words under another head are another group
      const path = groups.slice(0, row + 1).join('\n');
      const last = spans.at(-1);
      if (last?.path === path) last.width += 1;
      else spans.push({ text: groups[row] ?? '', width: 1, path });
    }
    return spans.map(({ text, width }) => ({ text, width }));
  });
}

/** The whole head of a column on one line, for formats without spanning heads. */
export const fullLabel = ({ groups = [], label }: TableColumn): string =>
  [...groups, label].filter(Boolean).join(', ');

/** Whether heads of columns may be broken into lines. */
export type HeadWrapping = 'wrapped' | 'onOneLine';

/** Longer words in a cell are set in several lines of this length. */
export const LONGEST_LINE = 24;
const CELL_PADDING = 3;

/** Characters that the widest cells of a row take together, with the space between columns and the heads above them. */
export function tableWidth({ columns, rows }: TextTable, labels: HeadWrapping): number {
  const headWidth = (text: string) =>
    labels === 'wrapped' ? Math.max(...text.split(' ').map(({ length }) => length)) : text.length;
  const widths = columns.map(({ label }, index) => {
    const cells = rows.map((row) => Math.min(row[index]?.length ?? 0, LONGEST_LINE));
    return CELL_PADDING + Math.max(headWidth(label), ...cells);
  });
  const excesses = headSpans(columns).map((spans) => {
    let column = 0;
    return spans.reduce((excess, { text, width }) => {
      const below = sum(widths.slice(column, column + width));
      column += width;
      return excess + Math.max(0, CELL_PADDING + headWidth(text) - below);
    }, 0);
  });
  return sum(widths) + Math.max(0, ...excesses);
}

const sum = (numbers: readonly number[]): number => numbers.reduce((a, b) => a + b, 0);

/**
 * The table in parts that are narrow enough to be printed, each with the first column.
 *
 * @param mostCharacters - largest width of a part
 */
export function splitTable(
  table: TextTable,
  mostCharacters: number,
  labels: HeadWrapping,
): readonly TextTable[] {
  const withColumns = (indices: readonly number[]): TextTable => ({
    ...table,
    columns: [0, ...indices].map((index) => table.columns[index]!),
    rows: table.rows.map((row) => [0, ...indices].map((index) => row[index] ?? '')),
  });
  const parts: number[][] = [];
  for (let index = 1; index < table.columns.length; index += 1) {
    const last = parts.at(-1);
    if (last && tableWidth(withColumns([...last, index]), labels) <= mostCharacters) last.push(index);
    else parts.push([index]);
  }
  if (parts.length < 2) return [table];
  return parts.map((indices, part) => ({
    ...withColumns(indices),
    heading: part === 0 ? table.heading : `${table.heading} (continued)`,
    notes: part === parts.length - 1 ? table.notes : [],
  }));
}
