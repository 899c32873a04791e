import { existsSync, mkdirSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readResultsFile } from '../../../app/calculation/read-results-file';
import { resultsJson, writeResults } from '../../../app/calculation/write-results';
import { sampleResults } from '../../support/sample-results';
import { temporaryFolder } from '../../support/temporary-folder';

const folder = temporaryFolder();
const results = sampleResults();

describe('writeResults', () => {
  it('writes results and table, and nothing else', async () => {
    const paths = await writeResults(results, folder, 'sample');
    expect(paths).toEqual([join(folder, 'sample.results.json'), join(folder, 'sample.csv')]);
    expect(readdirSync(folder).sort()).toEqual(['sample.csv', 'sample.results.json']);
    expect(readFileSync(paths[1]!, 'utf8')).toMatch(/^coordinate,RHF,CISD,FCI\r\n/);
  });

  it('writes what reads back as the same results, to the last bit', async () => {
    const [path] = await writeResults(results, folder, 'again');
    expect(await readResultsFile(path!)).toEqual({ ok: true, name: 'again', results });
  });

  it('leaves nothing half-written behind when it cannot write', async () => {
    const blocked = join(folder, 'blocked');
    mkdirSync(join(blocked, 'a.results.json'), { recursive: true });
    await expect(writeResults(results, blocked, 'a')).rejects.toThrow();
    expect(readdirSync(blocked)).toEqual(['a.results.json']);
    expect(existsSync(join(blocked, 'a.csv'))).toBe(false);
  });
});

describe('resultsJson', () => {
  it('keeps all the digits of a double', () => {
    const nuclearRepulsion = 0.1 + 0.2;
    const [point] = results.points;
    const text = resultsJson({ ...results, points: [{ ...point!, nuclearRepulsion }] });
    expect(text).toContain('"nuclearRepulsion": 0.30000000000000004');
  });
});
