import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { Study, StudyResults } from '#engine';
import { studyCsv } from '../../app/study/csv';
import { parseResults } from '../../app/study/parse-results';
import { farwell, startFarwell } from '../support/built-program';
import { helium } from '../support/end-to-end-studies';
import { temporaryFolder } from '../support/temporary-folder';

const folder = temporaryFolder();

function writtenStudy(name: string, study: Study = helium): string {
  mkdirSync(join(folder, name));
  const path = join(folder, name, `${name}.study.json`);
  writeFileSync(path, JSON.stringify(study));
  return path;
}

function readResults(text: string): StudyResults {
  const parsed = parseResults(text);
  if (!parsed.ok) throw new Error(JSON.stringify(parsed.issues));
  return parsed.results;
}

describe('farwell run', () => {
  it('writes results and table beside the study, and only their paths on standard output', async () => {
    const path = writtenStudy('heh');
    const { status, stdout, stderr } = await farwell('run', path);
    expect(status).toBe(0);
    const written = ['heh.results.json', 'heh.csv'].map((name) => join(folder, 'heh', name));
    expect(stdout).toBe(`${written.join('\n')}\n`);
    expect(readdirSync(join(folder, 'heh')).sort()).toEqual([
      'heh.csv',
      'heh.results.json',
      'heh.study.json',
    ]);
    expect(stderr.split('\n')[0]).toBe(
      'Pull the He–H bond of HeH⁺ from 0.4 to 4 Å in 10 steps, in STO-3G, with RHF, CIS, CISD and FCI.',
    );
    expect(stderr).toContain('10 of 10 points');

    const results = readResults(readFileSync(written[0]!, 'utf8'));
    expect(results.study).toEqual({
      ...helium,
      molecule: { ...helium.molecule, multiplicity: 1 },
      states: 1,
      frozenCore: false,
      orbitals: 'restricted',
      convergence: { energy: 1e-10 },
    });
    expect(results.points).toHaveLength(10);
    expect(readFileSync(written[1]!, 'utf8')).toBe(studyCsv(results));
  });

  it('identity: CISD of two electrons is their full CI, and neither lies above RHF', async () => {
    const { stdout } = await farwell('run', writtenStudy('laws'), '--print');
    for (const { levels } of readResults(stdout).points) {
      const [RHF, CISD, FCI] = [levels.RHF, levels.CISD, levels.FCI];
      if (RHF?.kind !== 'hartreeFock' || CISD?.kind !== 'correlated' || FCI?.kind !== 'correlated') {
        throw new Error('a level is missing');
      }
      expect(Math.abs(CISD.energy - FCI.energy)).toBeLessThan(1e-10);
      expect(FCI.energy).toBeLessThanOrEqual(RHF.energy);
      expect(FCI.correlation).toBeCloseTo(FCI.energy - RHF.energy, 12);
    }
  });

  it('makes the folder that --out names', async () => {
    const path = writtenStudy('elsewhere');
    const out = join(folder, 'new', 'deeper');
    const { status, stdout } = await farwell('run', path, '--out', out);
    expect(status).toBe(0);
    expect(stdout).toBe(`${join(out, 'elsewhere.results.json')}\n${join(out, 'elsewhere.csv')}\n`);
    expect(readdirSync(join(folder, 'elsewhere'))).toEqual(['elsewhere.study.json']);
  });

  it('prints the same results that it writes, and then writes no files', async () => {
    const path = writtenStudy('printed');
    const printed = await farwell('run', path, '--print', '--workers', '1');
    expect(printed.status).toBe(0);
    expect(readdirSync(join(folder, 'printed'))).toEqual(['printed.study.json']);
    await farwell('run', path, '--workers', '2');
    expect(printed.stdout).toBe(readFileSync(join(folder, 'printed', 'printed.results.json'), 'utf8'));
  });

  it('computes one geometry without a scan, with an empty coordinate in the table', async () => {
    const { scan: _, ...single } = helium;
    const path = writtenStudy('single', { ...single, levels: ['RHF'] });
    expect((await farwell('run', path)).status).toBe(0);
    expect(readFileSync(join(folder, 'single', 'single.csv'), 'utf8')).toMatch(
      /^coordinate,RHF\r\n,-2\.\d{10,}\r\n$/,
    );
  });

  it('reads a basis set in a file beside the study, wherever it is called from', async () => {
    const basis = {
      molssi_bse_schema: { schema_type: 'complete', schema_version: '0.1' },
      name: 'two Gaussians',
      elements: Object.fromEntries(
        ['1', '2'].map((atomicNumber) => [
          atomicNumber,
          {
            electron_shells: [
              {
                function_type: 'gto',
                region: '',
                angular_momentum: [0],
                exponents: ['1.2', '0.3'],
                coefficients: [['0.5', '0.6']],
              },
            ],
          },
        ]),
      ),
    };
    const path = writtenStudy('with-basis', { ...helium, levels: ['RHF'], basis: { file: 'sets/two.json' } });
    mkdirSync(join(folder, 'with-basis', 'sets'));
    writeFileSync(join(folder, 'with-basis', 'sets', 'two.json'), JSON.stringify(basis));
    const { status, stdout, stderr } = await farwell('run', path, '--print');
    expect(stderr).toContain('10 of 10 points');
    expect(status).toBe(0);
    expect(readResults(stdout).basis.shells.H?.[0]?.exponents).toEqual([1.2, 0.3]);
  });

  it('is not disturbed by a reader that leaves early', async () => {
    const running = startFarwell('run', writtenStudy('left'), '--print');
    running.process.stdout?.destroy();
    const { status, stderr } = await running.ended;
    expect(status).toBe(0);
    expect(stderr).not.toContain('EPIPE');
  });
});
