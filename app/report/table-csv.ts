import { csvText } from '../study/csv-text';
import { fullLabel, type TextTable } from './text-table';

/** A table as CSV (RFC 4180, CRLF), the numbers with plain minus signs, so that a spreadsheet reads them. */
export function tableCsv({ columns, rows }: TextTable): string {
  return csvText(
    [columns.map(fullLabel), ...rows].map((row) => row.map((cell) => cell.replace(/^−(?=\d)/, '-'))),
  );
}
