import { execFileSync } from 'node:child_process';
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { farwell } from '../support/built-program';
import { helium, nitrogen } from '../support/end-to-end-studies';
import { temporaryFolder } from '../support/temporary-folder';

const { version } = JSON.parse(readFileSync('package.json', 'utf8')) as { version: string };
const folder = temporaryFolder();

function written(name: string, content: unknown): string {
  const path = join(folder, name);
  writeFileSync(path, JSON.stringify(content));
  return path;
}

describe('farwell check', () => {
  it('explains a study without computing it', async () => {
    const { status, stdout, stderr } = await farwell('check', written('n2.study.json', nitrogen));
    expect(status).toBe(0);
    expect(stderr).toBe('');
    expect(stdout).toContain('Pull the N–N bond of N₂ from 0.9 to 2 Å in 9 steps');
    expect(stdout).toMatch(/^electrons +14$/m);
    expect(stdout).toMatch(/^basis functions +10$/m);
    expect(stdout).toMatch(/^frozen core orbitals +2$/m);
    expect(stdout).toMatch(/^points +9$/m);
    // 8 active orbitals, 5 electrons of either spin: C(8,5)²
    expect(stdout).toMatch(/^FCI +3,136 +/m);
  });
});

describe('farwell basis', () => {
  it('lists the basis sets', async () => {
    const { status, stdout } = await farwell('basis');
    expect(status).toBe(0);
    for (const name of ['STO-2G', 'STO-3G', 'STO-6G']) expect(stdout).toContain(`${name}\n`);
  });

  it('prints a set that a study can hold as it is, with the same energies', async () => {
    const { status, stdout } = await farwell('basis', 'sto-3g');
    expect(status).toBe(0);
    const energies = async (name: string, basis: unknown) => {
      const { stdout: text } = await farwell('run', written(name, { ...helium, basis }), '--print');
      const { points } = JSON.parse(text) as { points: { levels: { FCI: { energy: number } } }[] };
      return points.map(({ levels }) => levels.FCI.energy);
    };
    const named = await energies('named.study.json', 'STO-3G');
    const spelledOut = await energies('spelled-out.study.json', JSON.parse(stdout));
    for (const [index, energy] of spelledOut.entries()) expect(energy).toBeCloseTo(named[index]!, 10);
  });
});

describe('farwell report', () => {
  it('writes figures and tables of results into a folder', async () => {
    const study = written('heh.study.json', helium);
    await farwell('run', study);
    const out = join(folder, 'report');
    const { status, stdout, stderr } = await farwell(
      'report',
      join(folder, 'heh.results.json'),
      '--out',
      out,
    );
    expect(stderr).toBe('');
    expect(status).toBe(0);
    const paths = stdout.trimEnd().split('\n');
    expect(paths.every((path) => path.startsWith(out))).toBe(true);
    for (const ending of [
      '.svg',
      '.pdf',
      '.png',
      '.csv',
      '.json',
      '.tex',
      '.md',
      '.report.html',
      '.report.pdf',
    ]) {
      const path = paths.find((name) => name.endsWith(ending));
      expect(path, ending).toBeDefined();
      expect(readFileSync(path!).length).toBeGreaterThan(100);
    }
  });
});

describe('the program', () => {
  it('shows help and version on standard output', async () => {
    const help = await farwell('--help');
    expect(help).toMatchObject({ status: 0, stderr: '' });
    for (const command of ['run', 'check', 'basis', 'report'])
      expect(help.stdout).toContain(`farwell ${command}`);
    expect(await farwell('--version')).toEqual({ status: 0, stdout: `${version}\n`, stderr: '' });
  });

  it('is what `npx farwell` runs in the checkout', () => {
    const root = join(import.meta.dirname, '..', '..');
    const text = execFileSync('npx', ['farwell', '--version'], {
      cwd: root,
      encoding: 'utf8',
      shell: process.platform === 'win32',
    });
    expect(text).toBe(`${version}\n`);
  });

  it('also answers from another folder, through a link', () => {
    mkdirSync(join(folder, 'bin'));
    const link = join(folder, 'bin', 'farwell.mjs');
    writeFileSync(
      link,
      `import ${JSON.stringify(join(import.meta.dirname, '..', '..', 'out', 'farwell.js'))};\n`,
    );
    expect(execFileSync(process.execPath, [link, '--version'], { cwd: folder, encoding: 'utf8' })).toBe(
      `${version}\n`,
    );
  });
});
