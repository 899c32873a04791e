import { describe, expect, it } from 'vitest';
import { prepareStudy } from '#engine';
import type { WorkerReply, WorkerStart } from '../../../app/calculation/messages';
import { startWorkerThread } from '../../../app/calculation/worker-thread';
import { helium } from '../../support/end-to-end-studies';

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
