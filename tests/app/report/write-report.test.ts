import { mkdtemp, readdir, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join, relative } from 'node:path';
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
  it('writes every file of the report, nothing else, and says where', async () => {
    const out = join(folder, 'new', 'reports');
    const paths = await writeReport([sampleResults(['RHF'])], ['h2'], out, { widthMillimetres: 60 });
    expect(paths.map((path) => relative(out, path)).toSorted()).toEqual([
      'h2.csv',
      'h2.figure-60mm.pdf',
      'h2.figure-60mm.png',
      'h2.figure-60mm.svg',
      'h2.points.json',
      'h2.report.html',
      'h2.report.md',
      'h2.report.pdf',
      'h2.tables.tex',
      'h2.tables/findings.csv',
    ]);
    const there = (await readdir(out, { recursive: true, withFileTypes: true }))
      .filter((entry) => entry.isFile())
      .map((entry) => join(entry.parentPath, entry.name));
    expect(there.toSorted()).toEqual(paths.toSorted());
    expect(await readFile(paths[0]!, 'utf8')).toBe(studyCsv(sampleResults(['RHF'])));
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
    const results = sampleResults(['RHF']);
    const { scan: _, ...study } = results.study;
    const single = { ...results, study, points: [{ ...results.points[0]!, coordinate: null }] };
    const [first] = await writeReport([single], ['../x'], folder);
    expect(first).toBe(join(folder, '..-x.csv'));
  });
});
