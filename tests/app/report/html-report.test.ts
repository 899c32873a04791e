import { HtmlValidate } from 'html-validate';
import { describe, expect, it } from 'vitest';
import { htmlReport } from '../../../app/report/html-report';
import { documentOf, withSpectroscopy } from '../../support/reports';
import { sampleResults } from '../../support/sample-results';

const figure = '<svg xmlns="http://www.w3.org/2000/svg" role="img" viewBox="0 0 1 1"><title>h2</title></svg>';
const html = htmlReport(documentOf(sampleResults()), figure);

describe('htmlReport', () => {
  it('has figure, findings, cautions, method, references and all points under the study sentence', () => {
    expect(html).toContain(
      '<h1>Pull the H–H bond of H₂ from 0.4 to 4 Å in 37 steps, in STO-3G, with RHF, CISD and FCI.</h1>',
    );
    expect(html).toContain(figure);
    expect([...html.matchAll(/<h2>(.*?)<\/h2>/g)].map(([, heading]) => heading)).toEqual([
      'Findings',
      'Electron correlation',
      'Cautions',
      'Method',
      'References',
      'Appendix',
    ]);
    const energies = html.slice(html.indexOf('Energies at all points'));
    expect(energies.match(/<th scope="row">/g)).toHaveLength(37);
  });

  it.each([
    ['of a study', [sampleResults()]],
    ['with levels and excited states', [withSpectroscopy(40), sampleResults(['RHF', 'CIS'])]],
  ])('is valid HTML %s', async (_, results) => {
    const validator = new HtmlValidate({ extends: ['html-validate:recommended'] });
    const report = await validator.validateString(htmlReport(documentOf(...results), figure));
    expect(report.results.flatMap(({ messages }) => messages.map(({ message }) => message))).toEqual([]);
  });

  it('loads nothing from elsewhere', () => {
    expect(html).not.toMatch(/\b(src|href)=|url\(|@import|<script|<link/);
  });

  it('shows titles, notes and names as text, never as markup', () => {
    const results = sampleResults();
    const study = { ...results.study, title: '<script>alert(1)</script>', notes: 'a & "b"' };
    const text = htmlReport(documentOf({ ...results, study }), undefined);
    expect(text).not.toContain('<script>');
    expect(text).toContain('&lt;script&gt;alert(1)&lt;/script&gt;');
    expect(text).toContain('a &amp; &quot;b&quot;');
  });
});
