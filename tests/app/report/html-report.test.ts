import { describe, expect, it } from 'vitest';
import { htmlReport } from '../../../app/report/html-report';
import { reportContent } from '../../../app/report/report-content';
import { sampleResults } from '../../support/sample-results';

const sentence = 'Pull the H–H bond of H₂ from 0.4 to 4 Å.';
const figure = '<svg xmlns="http://www.w3.org/2000/svg"><title>h2</title></svg>';

describe('htmlReport', () => {
  it('has figure, energies, findings, cautions and method under the study sentence', () => {
    const html = htmlReport(reportContent([sampleResults()], ['h2'], [sentence]), figure);
    expect(html).toContain(`<h1>${sentence}</h1>`);
    expect(html).toContain(figure);
    expect([...html.matchAll(/<h2>(.*?)<\/h2>/g)].map(([, heading]) => heading)).toEqual([
      'Energies',
      'Findings',
      'Cautions',
      'Method',
    ]);
    expect(html.match(/<th scope="row">/g)).toHaveLength(37);
    expect(html).toContain('<td>FCI</td><td>0.74000 Å</td><td>−1.170000</td>');
  });

  it('loads nothing from elsewhere', () => {
    const html = htmlReport(reportContent([sampleResults()], ['h2'], [sentence]), figure);
    expect(html).not.toMatch(/\b(src|href)=|url\(|@import|<script|<link/);
  });

  it('shows titles, notes and names as text, never as markup', () => {
    const results = sampleResults();
    const study = { ...results.study, title: '<script>alert(1)</script>', notes: 'a & "b"' };
    const html = htmlReport(
      reportContent([{ ...results, study }, results], ['<b>', 'c'], ['A.', 'B.']),
      undefined,
    );
    expect(html).not.toContain('<script>');
    expect(html).not.toContain('<b>');
    expect(html).toContain('&lt;script&gt;alert(1)&lt;/script&gt;');
    expect(html).toContain('a &amp; &quot;b&quot;');
    expect(html).toContain('Comparison of &lt;b&gt; and c');
  });
});
