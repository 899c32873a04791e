import { describe, expect, it } from 'vitest';
import { computePoint, type HartreeFockResult } from '#engine';
import { makeCurvesContinuous } from '../../../app/calculation/continuous-curves';
import type { FinishedPoint, WorkerReply, WorkerRequest } from '../../../app/calculation/messages';
import { serve } from '../../../app/calculation/serve';
import type { WorkerPool } from '../../../app/calculation/worker-pool';
import { atom, prepare, study } from '../../support/studies';

/** OH as its bond breaks: UHF started afresh is caught in a higher solution about 2.4 Å. */
function hydroxyl(values: readonly number[]) {
  const plain = study([atom('O'), atom('H', 0, 0, 0.97)], {
    unit: 'angstrom',
    basis: '6-31G',
    levels: ['ROHF', 'UHF'],
  });
  return prepare({
    ...plain,
    molecule: { ...plain.molecule, multiplicity: 2 },
    scan: { coordinate: { bonds: [[0, 1]] }, values },
  });
}

/** Does every task at once in this thread, as a worker would. */
function poolOf(prepared: ReturnType<typeof hydroxyl>): WorkerPool {
  return {
    async perform(tasks) {
      for (const task of tasks) {
        const replies: WorkerReply[] = [];
        let ask: (request: WorkerRequest) => void = () => undefined;
        serve(
          { post: (reply) => replies.push(reply), onMessage: (listener) => (ask = listener) },
          { study: prepared.study },
        );
        ask(task.request());
        for (const reply of replies) {
          if (reply.kind === 'failed') throw new Error(reply.error.message);
          if (reply.kind !== 'free') task.accept(reply);
        }
      }
    },
    close: () => undefined,
  };
}

const uhf = ({ result }: FinishedPoint) => (result.levels.UHF as HartreeFockResult).energy;

async function follow(values: readonly number[]) {
  const prepared = hydroxyl(values);
  const fresh = prepared.coordinates.map((coordinate) => computePoint(prepared, coordinate));
  const improved: number[] = [];
  const outcome = await makeCurvesContinuous({
    prepared,
    basis: 0,
    points: fresh,
    pool: poolOf(prepared),
    onImproved: (index) => improved.push(index),
    onRound: () => ({ finished: () => undefined, stop: () => undefined }),
  });
  return { fresh, improved, ...outcome };
}

describe('makeCurvesContinuous', () => {
  it('leads a point that was caught in a higher solution down to its neighbours’ one, and no point up', async () => {
    const { fresh, improved, points } = await follow([2, 2.2, 2.4, 2.6, 3]);
    points.forEach((point, index) => {
      expect(uhf(point)).toBeLessThanOrEqual(uhf(fresh[index]!) + 1e-9);
    });
    // beyond 2 Å the curve is flat to 1 mEh, while the higher solution lies 40 mEh above
    const energies = points.map(uhf);
    expect(Math.max(...energies) - Math.min(...energies)).toBeLessThan(2e-3);
    expect(improved.length).toBeGreaterThan(0);
  });

  it('gives the same curve whatever order the points are listed in', async () => {
    const rising = await follow([2, 2.2, 2.4, 2.6, 3]);
    const mixed = await follow([2.4, 2, 3, 2.6, 2.2]);
    const sorted = [1, 4, 0, 3, 2].map((index) => uhf(mixed.points[index]!));
    rising.points.forEach((point, index) => {
      expect(Math.abs(uhf(point) - sorted[index]!)).toBeLessThan(1e-8);
    });
  });

  it('says where two solutions cross, and how far apart they are', async () => {
    const { crossings } = await follow([1.9, 2, 2.2, 2.4]);
    expect(crossings).toHaveLength(1);
    expect(crossings[0]).toMatchObject({ kind: 'restricted', range: [2, 2.2] });
    expect(crossings[0]!.gap).toBeGreaterThan(1e-3);
  });

  it('leaves a single point alone', async () => {
    const { fresh, points, crossings } = await follow([1]);
    expect(points).toEqual(fresh);
    expect(crossings).toEqual([]);
  });
});
