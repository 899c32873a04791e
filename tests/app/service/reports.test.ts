import { describe, expect, it } from 'vitest';
import type { ReportPart } from '../../../app/contract/requests';
import { makeReport } from '../../../app/service/reports';
import { sampleResults } from '../../support/sample-results';

const results = [{ name: 'h2', text: JSON.stringify(sampleResults()) }];
const make = (part: ReportPart) => makeReport({ results, part });
const decoded = (base64: string) => Buffer.from(base64, 'base64');

describe('makeReport', () => {
  it('makes the part asked for, of results as their file holds them', async () => {
    const { files } = await make('html');
    expect(files.map(({ name }) => name)).toEqual(['h2.report.html']);
    expect(decoded(files[0]!.base64).toString('utf8')).toContain('<h1>Pull the H–H bond of H₂');
    const figure = await makeReport({ results, part: 'figureSvg', options: { widthMillimetres: 60 } });
    expect(figure.files.map(({ name }) => name)).toEqual(['h2.figure-60mm.svg']);
  });

  it('makes one figure, and a file for every table', async () => {
    expect((await make('figureSvg')).files.map(({ name }) => name)).toEqual(['h2.figure-85mm.svg']);
    const { files } = await make('tableCsv');
    expect(files.map(({ name }) => name)).toContain('h2.tables/findings.csv');
  });

  it('refuses what are no results, and a size without room, as the window can show it', async () => {
    await expect(makeReport({ results: [{ name: 'x', text: '{' }], part: 'html' })).rejects.toMatchObject({
      name: 'Refusal',
      code: 'json.syntax',
    });
    await expect(
      makeReport({ results, part: 'figurePdf', options: { heightMillimetres: 40 } }),
    ).rejects.toMatchObject({ name: 'Refusal', code: 'report.figureTooSmall' });
  });
});
