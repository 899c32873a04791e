import { computePoint, type PreparedStudy } from '#engine';
import { runStudy } from '../../app/calculation/run-study';
import { inForm } from '../support/kernel-forms';
import { atom, prepare, study } from '../support/studies';
import { callsPerSecond, type Measurement } from './measure';

/** H2 in a minimal basis with every level, as fast as the mouse moves and much faster. */
const HYDROGEN = prepare(
  study([atom('H'), atom('H', 0, 0, 1.4)], {
    levels: ['RHF', 'CIS', 'CISD', 'FCI'],
    scan: { coordinate: { bonds: [[0, 1]] }, from: 0.6, to: 8, count: 75 },
  }),
);
/** The compiler goes on improving code as varied as a whole point's for seconds. */
const WARM_UP_SECONDS = 6;
/** A point takes long enough that starting threads does not count; the number of points is a multiple of two. */
const NITROGEN = prepare(
  study([atom('N'), atom('N', 0, 0, 2.07)], {
    basis: '6-31G',
    levels: ['RHF', 'CISDT'],
    frozenCore: true,
    scan: { coordinate: { bonds: [[0, 1]] }, from: 1.8, to: 3, count: 20 },
  }),
);

export async function curvePoints(): Promise<readonly Measurement[]> {
  const [two, one] = [await pointsPerSecond(2), await pointsPerSecond(1)];
  return [
    {
      name: 'points of H2, STO-3G, RHF + CIS + CISD + full CI',
      ours: pointRate(HYDROGEN),
      yardstick: inForm('plain', () => pointRate(HYDROGEN)),
      unit: 'points/s',
      against: 'the same with plain kernels',
    },
    {
      name: 'points of N2, 6-31G, RHF + CISDT, two workers',
      ours: two,
      yardstick: one,
      unit: 'points/s',
      against: 'one worker',
    },
  ];
}

function pointRate(prepared: PreparedStudy): number {
  let next = 0;
  return callsPerSecond(
    () => {
      computePoint(prepared, prepared.coordinates[next]);
      next = (next + 1) % prepared.coordinates.length;
    },
    1.5,
    WARM_UP_SECONDS,
  );
}

/** From the first finished point to the last, so that the start of the workers is left out. */
async function pointsPerSecond(workers: number): Promise<number> {
  const finished: number[] = [];
  const done = new AbortController();
  await runStudy(
    { prepared: NITROGEN },
    {
      workers,
      signal: done.signal,
      onPoint: () => {
        finished.push(performance.now());
        // what comes after the points is not asked for
        if (finished.length === NITROGEN.coordinates.length) done.abort();
      },
    },
  );
  const seconds = ((finished.at(-1) ?? Number.NaN) - finished[workers - 1]) / 1000;
  return (finished.length - workers) / seconds;
}
