import { spawnSync } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { availableParallelism, tmpdir } from 'node:os';
import { join } from 'node:path';
import { explainStudy, prepareStudy, type Study } from '#engine';
import { programBytes } from '../../app/calculation/memory';
import { measureSpeeds } from '../../app/calculation/speeds';
import { alignedTable } from '../../app/cli/wording';
import { programSeconds } from '../../app/study/whole-study';

const SAMPLES = 'sample-molecules';

/** Runs every sample and sets what `farwell check` predicts beside the time and memory that it took. */
export function comparePredictions(pattern: string): string {
  const speeds = measureSpeeds();
  const rows = readdirSync(SAMPLES)
    .filter((name) => name.endsWith('.study.json') && name.includes(pattern))
    .map((name) => {
      const path = join(SAMPLES, name);
      const preparation = prepareStudy(JSON.parse(readFileSync(path, 'utf8')) as Study);
      if (!preparation.ok) throw preparation.errors[0];
      const explanation = explainStudy(preparation.prepared, speeds);
      const workers = Math.min(availableParallelism(), explanation.points);
      const predicted = {
        seconds: programSeconds(explanation, workers),
        megabytes: programBytes(explanation, workers) / 1e6,
      };
      const real = run(path);
      return [
        name.replace('.study.json', ''),
        predicted.seconds.toFixed(1),
        real.seconds.toFixed(1),
        (predicted.seconds / real.seconds).toFixed(2),
        predicted.megabytes.toFixed(0),
        real.megabytes.toFixed(0),
        (predicted.megabytes / real.megabytes).toFixed(2),
      ];
    });
  return alignedTable([
    ['', 'predicted, s', 'took, s', 'ratio', 'predicted, MB', 'took, MB', 'ratio'],
    ...rows,
  ]);
}

/** In a process of its own; its table of timings ends with its memory. */
function run(study: string): { readonly seconds: number; readonly megabytes: number } {
  const folder = mkdtempSync(join(tmpdir(), 'farwell-benchmark-'));
  try {
    const program = join(import.meta.dirname, 'farwell.js');
    const argv = [program, 'run', study, '--no-cache', '--timings', '--out', folder];
    const { stderr } = spawnSync(process.execPath, argv, { encoding: 'utf8', maxBuffer: 1e8 });
    const seconds = Number(/the whole program ([\d.]+) s/.exec(stderr)?.[1]);
    const [, size, unit] = /Memory at most ([\d.,]+) ([MG]B)/.exec(stderr) ?? [];
    const megabytes = Number(size?.replace(',', '')) * (unit === 'GB' ? 1000 : 1);
    return { seconds, megabytes };
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
