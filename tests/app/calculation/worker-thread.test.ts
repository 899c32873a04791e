import { describe, expect, it } from 'vitest';
import { prepareStudy } from '#engine';
import type { WorkerReply, WorkerStart } from '../../../app/calculation/messages';
import { runStudy } from '../../../app/calculation/run-study';
import {
  endThreadsAhead,
  type StartWorker,
  startThreadsAhead,
  startWorkerThread,
} from '../../../app/calculation/worker-thread';
import { helium, water } from '../../support/end-to-end-studies';
import { prepare } from '../../support/studies';

const preparation = prepareStudy(helium);
if (!preparation.ok) throw preparation.errors[0];
const { study } = preparation.prepared;

describe('startWorkerThread', () => {
  it('answers each request with its findings, then says that it is free', async () => {
    const worker = startWorkerThread({ study });
    const replies = await new Promise<WorkerReply[]>((resolve, reject) => {
      const received: WorkerReply[] = [];
      worker.listen({
        onReply: (reply) => {
          received.push(reply);
          if (reply.kind === 'free') resolve(received);
        },
        onDeath: reject,
      });
      worker.post({ kind: 'points', basis: 0, indices: [2, 3] });
    });
    worker.end();
    expect(replies).toEqual([
      expect.objectContaining({
        kind: 'point',
        index: 2,
        carry: {
          restricted: {
            alpha: expect.any(Float64Array),
            beta: expect.any(Float64Array),
            energy: expect.any(Number),
          },
        },
      }),
      expect.objectContaining({ kind: 'point', index: 3 }),
      { kind: 'free' },
    ]);
  });

  it('answers the same from a thread that was started ahead, and ends one that nobody takes', async () => {
    const answer = async () => {
      const worker = startWorkerThread({ study });
      const reply = await new Promise<WorkerReply>((resolve, reject) => {
        worker.listen({ onReply: resolve, onDeath: reject });
        worker.post({ kind: 'points', basis: 0, indices: [1] });
      });
      worker.end();
      return { ...reply, seconds: 0 };
    };
    startThreadsAhead(2);
    const ahead = await answer();
    endThreadsAhead();
    expect(ahead).toEqual(await answer());
  });

  it('says why a request cannot be answered', async () => {
    const worker = startWorkerThread({ study });
    const reply = await new Promise<WorkerReply>((resolve, reject) => {
      worker.listen({ onReply: resolve, onDeath: reject });
      worker.post({ kind: 'points', basis: 0, indices: [99] });
    });
    worker.end();
    expect(reply).toMatchObject({
      kind: 'failed',
      error: { code: 'internal', message: expect.stringContaining('99') },
    });
  });

  it('tells of its death once, with the reason', async () => {
    const deaths: string[] = [];
    await new Promise<void>((resolve) => {
      const worker = startWorkerThread({ study: null } as unknown as WorkerStart);
      worker.listen({
        onReply: () => undefined,
        onDeath: (reason) => {
          deaths.push(reason);
          setTimeout(resolve, 50);
        },
      });
    });
    expect(deaths).toEqual([expect.stringContaining('null')]);
  });

  it('does not tell of a death that was asked for', async () => {
    const worker = startWorkerThread({ study });
    let told = 0;
    const tell = () => {
      told++;
    };
    worker.listen({ onReply: tell, onDeath: tell });
    worker.post({ kind: 'points', basis: 0, indices: [0, 1, 2, 3] });
    worker.end();
    await new Promise((resolve) => setTimeout(resolve, 300));
    expect(told).toBe(0);
  });
});

describe('a thread that is killed in the middle of a large product', () => {
  const prepared = prepare({ ...water, scan: { coordinate: water.scan!.coordinate, values: [100, 104] } });
  const run = (startWorker: StartWorker) => runStudy({ prepared }, { workers: 1, startWorker });

  it('is replaced, and no point is lost', async () => {
    let deaths = 0;
    const startMortal: StartWorker = (start) => {
      const thread = startWorkerThread(start);
      let onDeath: (reason: string) => void = () => undefined;
      return {
        ...thread,
        post(request) {
          thread.post(request);
          if (deaths > 0) return;
          setTimeout(() => {
            deaths++;
            thread.end();
            onDeath('it was killed');
          }, 150);
        },
        listen(listeners) {
          ({ onDeath } = listeners);
          thread.listen(listeners);
        },
      };
    };
    const outcome = await run(startMortal);
    expect(deaths).toBe(1);
    const unbroken = await run(startWorkerThread);
    expect(outcome.kind === 'done' && outcome.results.points).toEqual(
      unbroken.kind === 'done' && unbroken.results.points,
    );
  });

  it('is told in a clear message where it dies again', async () => {
    const outcome = await run((start) => {
      const thread = startWorkerThread(start);
      return {
        ...thread,
        listen: (listeners) => {
          thread.listen(listeners);
          setTimeout(() => {
            thread.end();
            listeners.onDeath('it was killed');
          }, 20);
        },
      };
    });
    expect(outcome).toMatchObject({
      kind: 'failed',
      error: {
        code: 'calculation.workerDied',
        message: 'The computing thread ended twice while computing the point at 100°: it was killed.',
      },
    });
  });
});
