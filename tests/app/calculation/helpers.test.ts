import { describe, expect, it } from 'vitest';
import { type StartHelper, startHelperThread } from '../../../app/calculation/helpers';
import type { Finding, WorkerStart } from '../../../app/calculation/messages';
import { openPool, type Task } from '../../../app/calculation/worker-pool';
import { startComputing } from '../../../app/calculation/worker-thread';
import { atom, correlated, prepare, study } from '../../support/studies';

/** Full CI of 108 900 determinants that no symmetry parts. */
const PREPARED = prepare(
  study([atom('O'), atom('H', 0.1, 1.5, 1.1), atom('H', 0, -1.6, 1)], {
    basis: '6-31G',
    levels: ['RHF', 'FCI'],
    active: { electrons: 8, orbitals: 11 },
  }),
);

/** The energy of the point, computed by one worker and so many helpers. */
async function energyWith(helpers: number, startHelper: StartHelper): Promise<number> {
  const start: WorkerStart = { study: PREPARED.study, helpers };
  const pool = openPool(1 + helpers, () => startComputing(start, startHelper));
  let energy: number | undefined;
  const task: Task = {
    request: () => ({ kind: 'points', basis: 0, indices: [0] }),
    accept: (finding: Finding) => {
      if (finding.kind === 'point') energy = correlated(finding.result).energy;
    },
    current: () => 'the only point',
  };
  try {
    await pool.perform([task]);
  } finally {
    pool.close();
  }
  return energy ?? Number.NaN;
}

describe('helping threads', () => {
  it('change no bit of the energy, and the point is not lost when one of them dies at work', async () => {
    let started = 0;
    const dying: StartHelper = (start, onDeath) => {
      const helper = startHelperThread(start, onDeath);
      // long enough to be at work, as the computing thread does not wait for it
      if (started++ === 0) setTimeout(() => helper.end(), 300);
      return helper;
    };
    const alone = await energyWith(0, startHelperThread);
    expect(alone).toBeLessThan(-76);
    expect(await energyWith(1, dying)).toBe(alone);
    // the one that died, and that of the worker which took over
    expect(started).toBe(2);
  }, 60_000);

  it('that always die end the calculation with a message', async () => {
    const dying: StartHelper = (start, onDeath) => {
      const helper = startHelperThread(start, onDeath);
      helper.end();
      return helper;
    };
    await expect(energyWith(1, dying)).rejects.toThrow(
      /ended twice while computing the only point: a helping thread ended/,
    );
  }, 60_000);
});
