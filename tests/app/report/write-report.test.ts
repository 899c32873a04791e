import { mkdtemp, readdir, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { writeReport } from '../../../app/report/write-report';
import { studyCsv } from '../../../app/study/csv';
import { sampleResults } from '../../support/sample-results';

let folder = '';
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'farwell-report-'));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

describe('writeReport', () => {
  it('writes figures, CSV, report and LaTeX table, nothing else, and says where', async () => {
    const paths = await writeReport([sampleResults()], ['h2'], join(folder, 'new', 'reports'));
    const names = paths.map((path) => basename(path));
    expect(names.toSorted()).toEqual([
      'h2.csv',
      'h2.figure-170mm.png',
      'h2.figure-170mm.svg',
      'h2.figure-85mm.png',
      'h2.figure-85mm.svg',
      'h2.report.html',
      'h2.report.md',
      'h2.table.tex',
    ]);
    expect((await readdir(join(folder, 'new', 'reports'))).toSorted()).toEqual(names.toSorted());
    expect(await readFile(paths[0]!, 'utf8')).toBe(studyCsv(sampleResults()));
    const svg = await readFile(paths.find((path) => path.endsWith('85mm.svg'))!, 'utf8');
    expect(svg).toContain('<desc>Pull');
  });

  it('makes one figure and table of several results, and keeps those of equal names apart', async () => {
    const paths = await writeReport([sampleResults(), sampleResults(['RHF'])], ['h2', 'h2'], folder);
    const names = paths.map((path) => basename(path));
    expect(names).toContain('h2.csv');
    expect(names).toContain('h2-2.csv');
    expect(names).toContain('h2-and-h2-2.report.md');
    expect(names.filter((name) => name.endsWith('.svg'))).toHaveLength(2);
  });

  it('writes the table of a single geometry without a figure', async () => {
    const results = sampleResults();
    const { scan: _, ...study } = results.study;
    const single = { ...results, study, points: [{ ...results.points[3]!, coordinate: null }] };
    const names = (await writeReport([single], ['h2'], folder)).map((path) => basename(path));
    expect(names).toEqual(['h2.csv', 'h2.report.md', 'h2.report.html', 'h2.table.tex']);
  });

  it('leaves nothing behind where the results share no axis', async () => {
    const results = sampleResults();
    const { scan: _, ...study } = results.study;
    await expect(writeReport([results, { ...results, study }], ['a', 'b'], folder)).rejects.toMatchObject({
      code: 'report.coordinatesDiffer',
    });
    expect(await readdir(folder)).toEqual([]);
  });

  it('cannot be led out of the folder by a name', async () => {
    const [first] = await writeReport([sampleResults(['RHF'])], ['../x'], folder);
    expect(first).toBe(join(folder, '..-x.csv'));
  });
});
