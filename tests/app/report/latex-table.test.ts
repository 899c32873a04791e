import { describe, expect, it } from 'vitest';
import { latexTable } from '../../../app/report/latex-table';
import { reportContent } from '../../../app/report/report-content';
import { sampleResults } from '../../support/sample-results';

const columnsOf = (line: string): number =>
  line
    .split('&')
    .map((cell) => Number(/\\multicolumn\{(\d+)\}/.exec(cell)?.[1] ?? 1))
    .reduce((a, b) => a + b, 0);

describe('latexTable', () => {
  const single = latexTable(reportContent([sampleResults()], ['h2'], ['Pull the H–H bond of H₂.']));

  it('has as many cells in every row as columns', () => {
    const [, columns] = /\\begin\{tabular\}\{(r+)\}/.exec(single)!;
    const rows = single.split('\n').filter((line) => line.endsWith('\\\\'));
    expect(rows.length).toBe(37 + 2);
    for (const row of rows) expect(columnsOf(row)).toBe(columns!.length);
  });

  it('spans each quantity by a rule, captions with the sentence, sets numbers in mathematics', () => {
    expect(single).toContain(
      '\\multicolumn{3}{c}{Energy (hartree)} & \\multicolumn{2}{c}{Correlation energy (hartree)}',
    );
    expect(single).toContain('\\cmidrule(lr){2-4} \\cmidrule(lr){5-6}');
    expect(single).toContain('\\caption{Pull the H--H bond of H\\textsubscript{2}.}');
    expect(single).toMatch(/\$0\.4\$ & \$-\d\.\d{6}\$/);
  });

  it('names the files above their columns in a comparison, and breaks a long table across pages', () => {
    const first = sampleResults(['RHF']);
    const shifted = first.points.map((point) => ({ ...point, coordinate: point.coordinate! + 0.05 }));
    const content = reportContent([first, { ...first, points: shifted }], ['a_1', 'b'], ['A.', 'B.']);
    const table = latexTable(content);
    expect(table).toContain('\\begin{longtable}{rrr}');
    expect(table).toContain('\\multicolumn{1}{c}{a\\_1} & \\multicolumn{1}{c}{b}');
    expect(table).toMatch(/\$0\.40\$ & \$-\d\.\d{6}\$ & -- \\\\/);
  });
});
