import { spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Study } from '#engine';
import { atom, study, waterAtoms } from '../support/studies';
import type { Measurement } from './measure';

interface WholeRun {
  readonly name: string;
  readonly study: Study;
  /** seconds asked for on two cores */
  readonly wanted: number;
}

const RUNS: readonly WholeRun[] = [
  {
    name: 'H2 sample, all levels, from a cold start',
    study: JSON.parse(readFileSync('sample-molecules/h2.study.json', 'utf8')) as Study,
    wanted: 1,
  },
  {
    name: 'H2O, 6-31G, RHF + CISD + full CI of ten electrons',
    study: study(waterAtoms(1.8, 104.5), { basis: '6-31G', levels: ['RHF', 'CISD', 'FCI'] }),
    wanted: 8,
  },
  {
    name: 'N2, 6-31G, frozen core, RHF + CISD, 40 distances',
    study: study([atom('N'), atom('N', 0, 0, 2.07)], {
      basis: '6-31G',
      levels: ['RHF', 'CISD'],
      frozenCore: true,
      scan: { coordinate: { bonds: [[0, 1]] }, from: 1.6, to: 5.5, count: 40 },
    }),
    wanted: 30,
  },
];

/** The whole program, from its start to the results on the disk, as rates so that more is better everywhere. */
export function wholeRuns(): readonly Measurement[] {
  return RUNS.map(({ name, study: request, wanted }) => ({
    name: `farwell run: ${name}`,
    ours: 1 / secondsOf(request),
    yardstick: 1 / wanted,
    unit: 'runs/s',
    against: `the ${wanted} s asked for`,
  }));
}

function secondsOf(request: Study): number {
  const folder = mkdtempSync(join(tmpdir(), 'farwell-benchmark-'));
  try {
    const path = join(folder, 'timed.study.json');
    writeFileSync(path, JSON.stringify(request));
    const began = performance.now();
    const program = join(import.meta.dirname, 'farwell.js');
    const { status, stderr } = spawnSync(process.execPath, [program, 'run', path, '--no-cache'], {
      encoding: 'utf8',
    });
    if (status !== 0) throw new Error(stderr);
    return (performance.now() - began) / 1000;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
