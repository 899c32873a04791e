import { availableParallelism, totalmem } from 'node:os';
import { describe, expect, it } from 'vitest';
import { explainStudy } from '#engine';
import { affordableWorkers, memoryBudget, WORKER_BYTES } from '../../../app/calculation/memory';
import { helium } from '../../support/end-to-end-studies';
import { prepare } from '../../support/studies';

const prepared = prepare(helium);
const bytes = Math.max(...explainStudy(prepared).levels.map((level) => level.bytes)) + WORKER_BYTES;

describe('affordableWorkers', () => {
  it('takes as many as are wanted where their points fit together, and says nothing', () => {
    expect(affordableWorkers(prepared, 3, 3 * bytes)).toEqual({ count: 3 });
    expect(affordableWorkers(prepared, undefined, 1e12)).toEqual({ count: availableParallelism() });
  });

  it('takes fewer where they do not, but one in any case, and says why', () => {
    const { count, notice } = affordableWorkers(prepared, 8, 3.5 * bytes);
    expect(count).toBe(3);
    expect(notice).toMatch(/^Computing 3 instead of 8 points at a time: one may take 0\.0 GB, and 0\.2 GB/);
    expect(affordableWorkers(prepared, 8, 1).count).toBe(1);
  });

  it('does not speak of workers that have no point to compute', () => {
    expect(affordableWorkers(prepared, 500, 10 * bytes)).toEqual({ count: 500 });
  });
});

describe('memoryBudget', () => {
  it('is a part of what this machine has', () => {
    expect(memoryBudget()).toBeGreaterThan(0);
    expect(memoryBudget()).toBeLessThan(totalmem());
  });
});
