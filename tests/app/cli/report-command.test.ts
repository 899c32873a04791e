import { mkdtemp, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Invocation } from '../../../app/cli/arguments';
import { EXIT } from '../../../app/cli/exit-codes';
import { reportCommand } from '../../../app/cli/report-command';
import type { Terminal } from '../../../app/cli/terminal';
import { sampleResults } from '../../support/sample-results';

let folder = '';
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'farwell-report-command-'));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

type ReportInvocation = Extract<Invocation, { kind: 'report' }>;

/** Runs the command on results written under these names, with what it said and printed. */
async function reported(files: Readonly<Record<string, unknown>>, options: Partial<ReportInvocation> = {}) {
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
  const status = await reportCommand(
    { kind: 'report', results: paths, out: join(folder, 'out'), hasCaption: true, ...options },
    terminal,
  );
  return { status, said: said.join('\n'), printed: printed.join('') };
}

describe('reportCommand', () => {
  it('prints the paths written, one a line', async () => {
    const { status, said, printed } = await reported({ h2: sampleResults(['RHF']) }, { width: 60 });
    expect(said).toBe('');
    expect(status).toBe(EXIT.done);
    const entries = await readdir(join(folder, 'out'), { recursive: true, withFileTypes: true });
    const paths = entries
      .filter((entry) => entry.isFile())
      .map(({ parentPath, name }) => join(parentPath, name));
    expect(printed.trimEnd().split('\n').toSorted()).toEqual(paths.toSorted());
  });

  it('prints geometries, and writes no files', async () => {
    const { status, printed } = await reported({ h2: sampleResults(['RHF']) }, { geometry: 0.9 });
    expect(status).toBe(EXIT.done);
    const [remark, ...atoms] = printed.trimEnd().split('\n');
    expect(remark).toBe('# H₂, H–H distance 0.9 Å; x y z in angstrom');
    expect(atoms.map((line) => line.split(/ +/))).toEqual([
      ['H', '0.0000000000', '0.0000000000', '0.0000000000'],
      ['H', '0.0000000000', '0.0000000000', '0.9000000000'],
    ]);
    expect(await readdir(folder)).toEqual(['h2.results.json']);
  });

  it('refuses a geometry that was not computed, and names the nearest', async () => {
    const { status, said } = await reported({ h2: sampleResults(['RHF']) }, { geometry: 0.93 });
    expect(status).toBe(EXIT.refused);
    expect(said).toContain('No point was computed at 0.93 Å.');
    expect(said).toContain('0.9 Å and 1 Å');
  });

  it('refuses a size without room for the curves', async () => {
    const { status, said } = await reported({ h2: sampleResults(['RHF']) }, { width: 60, height: 40 });
    expect(status).toBe(EXIT.refused);
    expect(said).toMatch(/Make it at least \d+ mm high/);
  });

  it('refuses files that hold no results, in plain words', async () => {
    expect((await reported({ x: { format: 'farwell/study' } })).said).toContain('holds a study, not results');
    expect((await reported({ x: [1] })).said).toContain('does not hold results of Farwell');
    const { status, said } = await reported({ x: { ...sampleResults(), version: 0 } });
    expect(status).toBe(EXIT.refused);
    expect(said).toContain('Compute the study again with this one.');
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
