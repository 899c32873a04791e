import { describe, expect, it } from 'vitest';
import { reportFiles } from '../../../app/report/report-files';
import { withSpectroscopy } from '../../support/reports';
import { sampleResults } from '../../support/sample-results';

const namesOf = (...args: Parameters<typeof reportFiles>) => reportFiles(...args).map(({ name }) => name);

describe('reportFiles', () => {
  it('makes figures of two widths, or of the one size asked for', () => {
    const figures = (options?: Parameters<typeof reportFiles>[2]) =>
      namesOf([sampleResults()], ['h2'], options).filter((name) => name.endsWith('.svg'));
    expect(figures()).toEqual(['h2.figure-85mm.svg', 'h2.figure-170mm.svg']);
    expect(figures({ widthMillimetres: 85, heightMillimetres: 120 })).toEqual(['h2.figure-85x120mm.svg']);
  });

  it('sets the study sentence in the picture unless told not to', async () => {
    const sizeOf = async (hasCaption: boolean) => {
      const svg = reportFiles([sampleResults(['RHF'])], ['h2'], { widthMillimetres: 60, hasCaption }).find(
        ({ part }) => part === 'figureSvg',
      );
      return String(await svg?.content()).length;
    };
    expect(await sizeOf(true)).toBeGreaterThan((await sizeOf(false)) + 10_000);
  });

  it('has a file for every table, the long ones whole', async () => {
    const tables = reportFiles([withSpectroscopy(40)], ['h2']).filter(({ part }) => part === 'tableCsv');
    expect(tables.map(({ name }) => name)).toEqual(
      ['findings', 'constants', 'correlation', 'levels'].map((id) => `h2.tables/${id}.csv`),
    );
    expect(String(await tables.at(-1)?.content()).match(/\r\n/g)).toHaveLength(41);
  });

  it('makes one report of several results, and keeps those of equal names apart', () => {
    const names = namesOf([sampleResults(), sampleResults(['RHF'])], ['h2', 'h2']);
    expect(names).toContain('h2.csv');
    expect(names).toContain('h2-2.points.json');
    expect(names).toContain('h2-and-h2-2.report.pdf');
    expect(names.filter((name) => name.endsWith('.svg'))).toHaveLength(2);
  });

  it('makes no figure of a single geometry', () => {
    const results = sampleResults();
    const { scan: _, ...study } = results.study;
    const single = { ...results, study, points: [{ ...results.points[3]!, coordinate: null }] };
    const parts = reportFiles([single], ['h2']).map(({ part }) => part);
    expect(parts).toContain('pdf');
    expect(parts.filter((part) => part.startsWith('figure'))).toEqual([]);
  });
});
