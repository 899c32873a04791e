import { computePoint, type PreparedStudy } from '#engine';
import { inForm } from '../support/kernel-forms';
import { atom, prepare, study } from '../support/studies';
import { callsPerSecond, type Measurement } from './measure';
import { secondsOfPoints } from './scan-points';

/** H2 in a minimal basis with every level, as fast as the mouse moves and much faster. */
const HYDROGEN = prepare(
  study([atom('H'), atom('H', 0, 0, 1.4)], {
    levels: ['RHF', 'CIS', 'CISD', 'FCI'],
    scan: { coordinate: { bonds: [[0, 1]] }, from: 0.6, to: 8, count: 75 },
  }),
);
/** The compiler goes on improving code as varied as a whole point's for seconds. */
const WARM_UP_SECONDS = 6;
/** Of N2, a multiple of two. */
const POINTS = 20;

export async function curvePoints(): Promise<readonly Measurement[]> {
  const rate = async (workers: number) => POINTS / (await secondsOfPoints(POINTS, workers));
  const [two, one] = [await rate(2), await rate(1)];
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
