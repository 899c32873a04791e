import { mkdtemp, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { EXIT } from '../../../app/cli/exit-codes';
import { reportCommand } from '../../../app/cli/report-command';
import type { Terminal } from '../../../app/cli/terminal';
import { sampleResults } from '../../support/sample-results';

let folder = '';
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'farwell-report-command-'));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

/** Runs the command on results written under these names, with what it said and printed. */
async function reported(files: Readonly<Record<string, unknown>>) {
  const said: string[] = [];
  const printed: string[] = [];
  const terminal: Terminal = {
    say: (text) => void said.push(text),
    print: async (text) => void printed.push(text),
    screen: undefined,
  };
  const paths = [];
  for (const [name, results] of Object.entries(files)) {
    const path = join(folder, `${name}.results.json`);
    await writeFile(path, JSON.stringify(results));
    paths.push(path);
  }
  const status = await reportCommand({ kind: 'report', results: paths, out: join(folder, 'out') }, terminal);
  return { status, said: said.join('\n'), printed: printed.join('') };
}

describe('reportCommand', () => {
  it('prints the paths written, one a line', async () => {
    const { status, printed } = await reported({ h2: sampleResults(['RHF']) });
    expect(status).toBe(EXIT.done);
    const names = (await readdir(join(folder, 'out'))).map((name) => join(folder, 'out', name));
    expect(printed.trimEnd().split('\n').toSorted()).toEqual(names.toSorted());
  });

  it('refuses results that share no axis, with what to do', async () => {
    const results = sampleResults(['RHF']);
    const { scan: _, ...study } = results.study;
    const single = { ...results, study, points: [{ ...results.points[0], coordinate: null }] };
    const { status, said, printed } = await reported({ h2: results, single });
    expect(status).toBe(EXIT.refused);
    expect(said).toContain('h2 has a scan of a distance, single has a single point');
    expect(said).toContain('Report them one by one');
    expect(printed).toBe('');
  });
});
