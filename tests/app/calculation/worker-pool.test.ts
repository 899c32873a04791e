import { describe, expect, it } from 'vitest';
import type { Finding, WorkerReply, WorkerRequest } from '../../../app/calculation/messages';
import { CalculationFailure, openPool, PoolClosed, type Task } from '../../../app/calculation/worker-pool';
import type { WorkerConnection } from '../../../app/calculation/worker-thread';

type Listeners = Parameters<WorkerConnection['listen']>[0];

/** A worker that a test steers by hand. */
class SteeredWorker implements WorkerConnection {
  readonly requests: WorkerRequest[] = [];
  hasEnded = false;
  private listeners: Listeners | undefined;

  post(request: WorkerRequest): void {
    this.requests.push(request);
  }
  listen(listeners: Listeners): void {
    this.listeners = listeners;
  }
  end(): void {
    this.hasEnded = true;
  }
  async reply(reply: WorkerReply): Promise<void> {
    this.listeners?.onReply(reply);
    await settled();
  }
  async die(reason = 'out of memory'): Promise<void> {
    this.listeners?.onDeath(reason);
    await settled();
  }
}

/** Lets everything run that waits for a promise. */
const settled = () => new Promise((resolve) => setImmediate(resolve));

const point = (index: number): Finding => ({
  kind: 'point',
  index,
  seconds: 1,
  result: { coordinate: index, atoms: [], nuclearRepulsion: 0, levels: {}, cautions: [] },
});

/** Points one after the other, as runs of a scan are. */
function pointsTask(...indices: number[]): Task & { readonly accepted: number[] } {
  const accepted: number[] = [];
  return {
    accepted,
    request: () => ({ kind: 'points', basis: 0, indices: indices.slice(accepted.length) }),
    accept: (finding) => void (finding.kind === 'point' && accepted.push(finding.index)),
    current: () => `point ${indices[accepted.length]}`,
  };
}

function steeredPool(size: number) {
  const workers: SteeredWorker[] = [];
  const pool = openPool(size, () => {
    const worker = new SteeredWorker();
    workers.push(worker);
    return worker;
  });
  return { pool, workers };
}

const free: WorkerReply = { kind: 'free' };

describe('openPool', () => {
  it('hands the next task to whichever worker is free first, and starts no more workers than there are tasks', async () => {
    const { pool, workers } = steeredPool(2);
    const done = pool.perform([pointsTask(0), pointsTask(1), pointsTask(2)]);
    expect(workers.map(({ requests }) => requests)).toEqual([
      [{ kind: 'points', basis: 0, indices: [0] }],
      [{ kind: 'points', basis: 0, indices: [1] }],
    ]);
    await workers[1]!.reply(free);
    expect(workers[1]!.requests[1]).toEqual({ kind: 'points', basis: 0, indices: [2] });
    await workers[0]!.reply(free);
    await workers[1]!.reply(free);
    await done;
    await Promise.all([pool.perform([pointsTask(3)]), workers[1]!.reply(free), workers[0]!.reply(free)]);
    expect(workers).toHaveLength(2);
  });

  it('lets a fresh worker go on where one died, and forgets nothing that was finished', async () => {
    const { pool, workers } = steeredPool(1);
    const task = pointsTask(4, 5, 6);
    const done = pool.perform([task]);
    await workers[0]!.reply(point(4));
    await workers[0]!.die();
    expect(workers[1]!.requests).toEqual([{ kind: 'points', basis: 0, indices: [5, 6] }]);
    await workers[1]!.reply(point(5));
    // another place: again worth a try
    await workers[1]!.die();
    await workers[2]!.reply(point(6));
    await workers[2]!.reply(free);
    await done;
    expect(task.accepted).toEqual([4, 5, 6]);
  });

  it('gives up when two workers died at the same place, and says where', async () => {
    const { pool, workers } = steeredPool(1);
    const done = pool.perform([pointsTask(7)]);
    const failure = done.catch((error: unknown) => error);
    await workers[0]!.die();
    await workers[1]!.die('heap limit');
    const error = await failure;
    expect(error).toBeInstanceOf(CalculationFailure);
    expect((error as CalculationFailure).error).toMatchObject({
      code: 'calculation.workerDied',
      message: 'The computing thread ended twice while computing point 7: heap limit.',
    });
    expect(workers).toHaveLength(2);
  });

  it('does not give a task to a worker that died while it had nothing to do', async () => {
    const { pool, workers } = steeredPool(1);
    const first = pool.perform([pointsTask(0)]);
    await workers[0]!.reply(free);
    await first;
    await workers[0]!.die();
    const second = pool.perform([pointsTask(1)]);
    await workers[1]!.reply(free);
    await second;
    expect(workers[0]!.requests).toHaveLength(1);
  });

  it('passes on why a worker gave up, and where', async () => {
    const { pool, workers } = steeredPool(1);
    const done = pool.perform([pointsTask(2)]);
    const failure = done.catch((error: unknown) => error);
    await workers[0]!.reply({
      kind: 'failed',
      error: {
        code: 'basis.linearlyDependent',
        place: 'basis',
        message: 'Too dependent.',
        remedy: 'Another.',
      },
    });
    expect(((await failure) as CalculationFailure).error).toEqual({
      code: 'basis.linearlyDependent',
      place: 'basis',
      message: 'Too dependent. This happened while computing point 2.',
      remedy: 'Another.',
    });
  });

  it('fails with the error of whoever takes the findings', async () => {
    const { pool, workers } = steeredPool(1);
    const task: Task = {
      ...pointsTask(0),
      accept: () => {
        throw new Error('disk full');
      },
    };
    const done = pool.perform([task]);
    const failure = done.catch((error: unknown) => error);
    await workers[0]!.reply(point(0));
    expect(await failure).toEqual(new Error('disk full'));
  });

  it('ends all workers at once when it is closed', async () => {
    const { pool, workers } = steeredPool(2);
    const done = pool.perform([pointsTask(0), pointsTask(1)]);
    pool.close();
    await expect(done).rejects.toBeInstanceOf(PoolClosed);
    expect(workers.map(({ hasEnded }) => hasEnded)).toEqual([true, true]);
  });
});
