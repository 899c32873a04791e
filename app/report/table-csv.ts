import { fullLabel, type TextTable } from './text-table';

/** A table as CSV (RFC 4180, CRLF), the numbers with plain minus signs, so that a spreadsheet reads them. */
export function tableCsv({ columns, rows }: TextTable): string {
  return [columns.map(fullLabel), ...rows]
    .map((row) => `${row.map((cell) => quoted(cell.replace(/^−(?=\d)/, '-'))).join(',')}\r\n`)
    .join('');
}

const quoted = (cell: string): string => (/[",\r\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell);
