import { describe, expect, it } from 'vitest';
import { markdownReport } from '../../../app/report/markdown-table';
import { reportContent, SAFETY_NOTE } from '../../../app/report/report-content';
import { sampleResults } from '../../support/sample-results';

const sentence = 'Pull the H–H bond of H₂ from 0.4 to 4 Å.';
const report = markdownReport(reportContent([sampleResults()], ['h2'], [sentence]));

describe('markdownReport', () => {
  it('has the study sentence as heading', () => {
    expect(report.split('\n')[0]).toBe(`# ${sentence}`);
  });

  it('has rows of equal length with units in the header', () => {
    const rows = report.split('\n').filter((line) => line.startsWith('| ') && line.includes('0.'));
    expect(rows.length).toBeGreaterThanOrEqual(37);
    const header = report.split('\n').find((line) => line.startsWith('| H–H distance'));
    expect(header).toBe(
      '| H–H distance (Å) | RHF energy (hartree) | CISD energy (hartree) | FCI energy (hartree) | CISD correlation energy (hartree) | FCI correlation energy (hartree) |',
    );
    for (const row of rows.slice(0, 37)) expect(row.split(' | ')).toHaveLength(6);
  });

  it('gives findings with a word of care, cautions, and where the numbers come from', () => {
    expect(report).toContain('| FCI | 0.74000 Å | −1.170000 |');
    expect(report).toContain('| RHF | lowest at the edge of the range, 0.4 Å |');
    expect(report).toContain(SAFETY_NOTE);
    expect(report).toContain('- RHF between 2.1 Å and 4 Å (20 points)');
    expect(report).toContain('J. Chem. Phys. 51, 2657 (1969)');
    expect(report).toContain('farwell 0.1.0');
  });

  it('keeps titles and notes from becoming markup', () => {
    const results = sampleResults();
    const study = { ...results.study, title: '*x* | <script>', notes: '# not\na heading' };
    const text = markdownReport(reportContent([{ ...results, study }], ['h2'], [sentence]));
    expect(text).toContain('*\\*x\\* \\| \\<script\\>*');
    expect(text).toContain('\\# not a heading');
  });

  it('says why there is no figure', () => {
    const content = reportContent(
      [sampleResults()],
      ['h2'],
      [sentence],
      'A single geometry has no curve to draw.',
    );
    expect(markdownReport(content)).toContain('No figure: A single geometry has no curve to draw.');
  });
});
