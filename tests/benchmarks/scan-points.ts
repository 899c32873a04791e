import { runStudy } from '../../app/calculation/run-study';
import { atom, prepare, study } from '../support/studies';

/**
 * Seconds that so many points of a scan of N2 take, each about half a second once the code is warm, from the first
 * finished point of every worker to the last: the start of the workers is left out.
 */
export async function secondsOfPoints(points: number, workers: number): Promise<number> {
  const prepared = prepare(
    study([atom('N'), atom('N', 0, 0, 2.07)], {
      basis: '6-31G',
      levels: ['RHF', 'CISDT'],
      frozenCore: true,
      scan: { coordinate: { bonds: [[0, 1]] }, from: 1.8, to: 3, count: points + workers },
    }),
  );
  const done = new AbortController();
  const finished: number[] = [];
  await runStudy(
    { prepared },
    {
      workers,
      signal: done.signal,
      // what comes after the points is not asked for
      onPoint: () => void (finished.push(performance.now()) === points + workers && done.abort()),
    },
  );
  return ((finished.at(-1) ?? Number.NaN) - (finished[workers - 1] ?? Number.NaN)) / 1000;
}
