import { describe, expect, it } from 'vitest';
import { markdownReport } from '../../../app/report/markdown-report';
import { SAFETY_NOTE } from '../../../app/report/report-content';
import { documentOf } from '../../support/reports';
import { sampleResults } from '../../support/sample-results';

const report = markdownReport(documentOf(sampleResults()), 'h2 figure.png');

describe('markdownReport', () => {
  it('has the study sentence as heading and as caption of the figure', () => {
    const sentence =
      'Pull the H–H bond of H₂ from 0.4 to 4 Å in 37 steps, in STO-3G, with RHF, CISD and FCI.';
    expect(report.split('\n')[0]).toBe(`# ${sentence}`);
    expect(report).toContain(`![${sentence} Bars mark the minima.](h2%20figure.png)`);
  });

  it('has rows of equal length with units in the header', () => {
    const energies = report.slice(report.indexOf('**Energies at all points**')).split('\n\n')[1];
    const [header = '', rule = '', ...rows] = energies?.split('\n') ?? [];
    expect(header).toBe(
      '| H–H distance (Å) | Energy (hartree), RHF | Energy (hartree), CISD | Energy (hartree), FCI | Correlation energy (hartree), CISD | Correlation energy (hartree), FCI |',
    );
    expect(rows).toHaveLength(37);
    for (const row of [rule, ...rows]) expect(row.split(' | ')).toHaveLength(6);
  });

  it('gives findings with a word of care, cautions, and where the numbers come from', () => {
    expect(report).toContain('| Minimum (Å) | at the edge, 0.4 Å | none | 0.74000 |');
    expect(report).toContain(SAFETY_NOTE);
    expect(report).toContain('- **RHF between 2.1 Å and 4 Å (20 points):** ');
    expect(report).toContain('J. Chem. Phys. 51, 2657 (1969)');
  });

  it('keeps titles and notes from becoming markup', () => {
    const results = sampleResults();
    const study = { ...results.study, title: '*x* | <script>', notes: '# not\na heading\n\n- 1\n\n1. 2' };
    const text = markdownReport(documentOf({ ...results, study }));
    expect(text).toContain('*\\*x\\* \\| \\<script\\>*');
    expect(text).toContain('\n\\# not a heading\n');
    expect(text).toContain('\n\\- 1\n');
    expect(text).toContain('\n1\\. 2\n');
  });

  it('says why there is no figure', () => {
    const results = sampleResults();
    const { scan: _, ...study } = results.study;
    const single = { ...results, study, points: [{ ...results.points[0]!, coordinate: null }] };
    expect(markdownReport(documentOf(single))).toContain(
      'No figure: A single geometry has no curve to draw.',
    );
  });
});
